import type { ReactNode } from "react";
import { AnnouncerProvider } from "@/components/ui/announcer";
import { pageCtx } from "@/lib/auth/session";
import { standIns } from "@/lib/env";
import { StaffKeys } from "./_client/staff-keys";

const STAND_IN_WORDS: Record<string, string> = { mail: "mail", files: "files", payments: "card payments" };

export default async function StaffLayout({ children }: { children: ReactNode }) {
  await pageCtx();
  const stood = standIns().map((name) => STAND_IN_WORDS[name] ?? name);
  return (
    <AnnouncerProvider>
      <StaffKeys />
      {children}
      {stood.length > 0 && (
        <footer className="foot">
          <span>
            Stand-ins on this machine serve {stood.join(" and ")}; nothing leaves it.
            {process.env.MAILBOX_URL && (
              <a className="link" href={process.env.MAILBOX_URL}>
                Mailbox
              </a>
            )}
          </span>
        </footer>
      )}
    </AnnouncerProvider>
  );
}
