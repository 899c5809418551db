import type { ReactNode } from "react";
import { Logo } from "@/components/ui/logo";
import { DeckArt } from "./_components/deck-art";
import "./auth.css";

export default function AuthLayout({ children }: { children: ReactNode }) {
  return (
    <div className="si">
      <main id="main">
        <div>
          <span className="brand">
            <Logo />
          </span>
        </div>
        {children}
        <p className="note">
          No account yet? Your shop’s owner invites you by e-mail.
          <br />A customer? Open the link in the message from your shop.
        </p>
      </main>
      <DeckArt />
    </div>
  );
}
