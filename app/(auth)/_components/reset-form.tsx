"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import "@/lib/fault-words";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { useForm } from "react-hook-form";
import { z } from "zod";
import { Button } from "@/components/ui/button";
import { TextInput } from "@/components/ui/inputs";
import { postAuth } from "./auth-request";

const askSchema = z.object({ email: z.email("That is not an e-mail address.") });

export function AskResetForm() {
  const [sentTo, setSentTo] = useState<string | null>(null);
  const form = useForm({ resolver: zodResolver(askSchema), defaultValues: { email: "" } });
  const { errors, isSubmitting } = form.formState;

  const send = form.handleSubmit(async ({ email }) => {
    const answer = await postAuth("/api/auth/request-password-reset", { email, redirectTo: "/reset" });
    if (answer.ok) setSentTo(email);
    else
      form.setError(
        "email",
        { message: answer.message || "The link could not be sent. Try again." },
        { shouldFocus: true },
      );
  });

  if (sentTo) {
    return (
      <div className="form" role="status">
        <h1>Look in your mail</h1>
        <p>If {sentTo} has an account, a link to set a new password is on its way. It works for one hour.</p>
        <p>
          <Link className="link" href="/sign-in">
            Back to sign in
          </Link>
        </p>
      </div>
    );
  }
  return (
    <form className="form" onSubmit={send} noValidate>
      <h1>Set a new password</h1>
      <TextInput
        id="email"
        type="email"
        label="E-mail"
        autoComplete="username"
        error={errors.email?.message}
        {...form.register("email")}
      />
      <Button type="submit" busy={isSubmitting} busyLabel="Sending">
        Send me a link
      </Button>
      <p>
        <Link className="link" href="/sign-in">
          Back to sign in
        </Link>
      </p>
    </form>
  );
}

const setSchema = z.object({
  password: z.string().min(10, "A password has at least ten characters.").max(128, "That is more than 128 characters."),
});

export function SetPasswordForm({ token }: { token: string }) {
  const router = useRouter();
  const form = useForm({ resolver: zodResolver(setSchema), defaultValues: { password: "" } });
  const { errors, isSubmitting } = form.formState;

  const send = form.handleSubmit(async ({ password }) => {
    const answer = await postAuth("/api/auth/reset-password", { newPassword: password, token });
    if (answer.ok) router.push("/sign-in");
    else
      form.setError(
        "password",
        { message: answer.message || "This link has run out. Ask for a new one." },
        { shouldFocus: true },
      );
  });

  return (
    <form className="form" onSubmit={send} noValidate>
      <h1>Your new password</h1>
      <TextInput
        id="password"
        type="password"
        label="New password"
        hint="At least ten characters."
        autoComplete="new-password"
        error={errors.password?.message}
        {...form.register("password")}
      />
      <Button type="submit" busy={isSubmitting} busyLabel="Setting">
        Set the password
      </Button>
    </form>
  );
}
