import type { Metadata } from "next";
import { AskResetForm, SetPasswordForm } from "../_components/reset-form";

export const metadata: Metadata = { title: "New password" };

export default async function ResetPage({ searchParams }: { searchParams: Promise<{ token?: string }> }) {
  const { token } = await searchParams;
  return token ? <SetPasswordForm token={token} /> : <AskResetForm />;
}
