"use client";

import { useRouter } from "next/navigation";
import { useEffect } from "react";

/** Reloads the page's data when the shop's rows change; only ids travel, the page asks for what it may see. */
export function LiveRefresh({ caseId }: { caseId?: string }) {
  const router = useRouter();
  useEffect(() => {
    const source = new EventSource(caseId ? `/api/events?case=${encodeURIComponent(caseId)}` : "/api/events");
    let timer: ReturnType<typeof setTimeout> | undefined;
    source.onmessage = () => {
      clearTimeout(timer);
      // several rows of one write arrive together
      timer = setTimeout(() => router.refresh(), 250);
    };
    return () => {
      clearTimeout(timer);
      source.close();
    };
  }, [caseId, router]);
  return null;
}
