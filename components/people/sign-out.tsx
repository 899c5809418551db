"use client";

import { useRouter } from "next/navigation";
import { Button } from "@/components/ui/button";

/** Ends the session on this device. */
export function SignOutButton({ look = "quiet" }: { look?: "quiet" | "link" }) {
  const router = useRouter();
  return (
    <Button
      look={look}
      onClick={async () => {
        await fetch("/api/auth/sign-out", {
          method: "POST",
          headers: { "content-type": "application/json" },
          body: "{}",
        });
        router.push("/sign-in");
        router.refresh();
      }}
    >
      Sign out
    </Button>
  );
}
