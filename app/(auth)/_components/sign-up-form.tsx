"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import "@/lib/fault-words";
import { useRouter } from "next/navigation";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { TextInput } from "@/components/ui/inputs";
import { type SignUpInput, signUpInput } from "@/lib/auth/sign-up-schema";
import { postAuth } from "./auth-request";

export function SignUpForm() {
  const router = useRouter();
  const form = useForm<SignUpInput>({
    resolver: zodResolver(signUpInput),
    defaultValues: { shopName: "", name: "", email: "", password: "" },
  });
  const { errors, isSubmitting } = form.formState;

  const send = form.handleSubmit(async (input) => {
    const made = await postAuth("/api/sign-up", {
      ...input,
      timeZone: Intl.DateTimeFormat().resolvedOptions().timeZone,
    });
    if (!made.ok) {
      const field = (made.pointer?.slice(1) || "email") as keyof SignUpInput;
      form.setError(field, { message: made.message }, { shouldFocus: true });
      return;
    }
    const answer = await postAuth("/api/auth/sign-in/email", { email: input.email, password: input.password });
    router.push(answer.ok ? "/cases" : "/sign-in");
    router.refresh();
  });

  return (
    <form className="form" onSubmit={send} noValidate>
      <h1>Open a shop</h1>
      <TextInput
        id="shopName"
        label="Name of the shop"
        autoComplete="organization"
        error={errors.shopName?.message}
        {...form.register("shopName")}
      />
      <TextInput
        id="name"
        label="Your name"
        autoComplete="name"
        error={errors.name?.message}
        {...form.register("name")}
      />
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
        hint="At least ten characters."
        autoComplete="new-password"
        error={errors.password?.message}
        {...form.register("password")}
      />
      <Button type="submit" busy={isSubmitting} busyLabel="Opening">
        Open the shop
      </Button>
    </form>
  );
}
