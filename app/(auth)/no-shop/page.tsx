import type { Metadata } from "next";
import { SignOutButton } from "@/components/people/sign-out";

export const metadata: Metadata = { title: "No shop yet" };

export default function NoShopPage() {
  return (
    <div className="form">
      <h1>You belong to no shop yet</h1>
      <p>Open the invitation in your mail, or ask the shop’s owner to send one to the address you signed in with.</p>
      <SignOutButton />
    </div>
  );
}
