"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import "@/lib/fault-words";
import Link from "next/link";
import { useRouter } from "next/navigation";
import { useForm } from "react-hook-form";
import { z } from "zod";
import { Button } from "@/components/ui/button";
import { TextInput } from "@/components/ui/inputs";
import { postAuth } from "./auth-request";

const schema = z.object({
  email: z.email("That is not an e-mail address."),
  password: z.string().min(1, "Type your password."),
  stay: z.boolean(),
});

export function SignInForm({ to }: { to: string }) {
  const router = useRouter();
  const form = useForm({ resolver: zodResolver(schema), defaultValues: { email: "", password: "", stay: false } });
  const { errors, isSubmitting } = form.formState;

  const send = form.handleSubmit(async ({ email, password, stay }) => {
    const answer = await postAuth("/api/auth/sign-in/email", { email, password, rememberMe: stay });
    if (answer.ok) {
      router.push(to);
      router.refresh();
      return;
    }
    const isWrong = answer.message.toLowerCase().includes("invalid email or password");
    form.setError(
      "password",
      { message: isWrong ? "That e-mail and password do not go together." : answer.message },
      { shouldFocus: true },
    );
  });

  return (
    <form className="form" onSubmit={send} noValidate>
      <h1>Sign in</h1>
      <TextInput
        id="email"
        type="email"
        label="E-mail"
        autoComplete="username"
        error={errors.email?.message}
        {...form.register("email")}
      />
      <TextInput
        id="password"
        type="password"
        label="Password"
        autoComplete="current-password"
        error={errors.password?.message}
        {...form.register("password")}
      />
      <label className="check">
        <input type="checkbox" {...form.register("stay")} />
        <span>Stay signed in on this device</span>
      </label>
      <Button type="submit" busy={isSubmitting} busyLabel="Signing in">
        Sign in
      </Button>
      <p>
        <Link className="link" href="/reset">
          Send me a link to set a new password
        </Link>
      </p>
    </form>
  );
}
