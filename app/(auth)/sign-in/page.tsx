import type { Metadata } from "next";
import { SignInForm } from "../_components/sign-in-form";

export const metadata: Metadata = { title: "Sign in" };

/** Only a path of our own may follow a sign-in, never another site. */
const ownPath = (to: string | undefined) => (to && /^\/(?![/\\])/.test(to) ? to : "/cases");

export default async function SignInPage({ searchParams }: { searchParams: Promise<{ to?: string }> }) {
  return <SignInForm to={ownPath((await searchParams).to)} />;
}
