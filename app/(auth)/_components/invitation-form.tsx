"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import "@/lib/fault-words";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { useForm } from "react-hook-form";
import { z } from "zod";
import { Button } from "@/components/ui/button";
import { TextInput } from "@/components/ui/inputs";
import { postAuth } from "./auth-request";

export interface InvitationFormProps {
  id: string;
  email: string;
  shopName: string;
  inviterName: string;
  roleWords: string;
  /** What stands between the visitor and a yes. */
  need: "account" | "sign-in" | "nothing";
}

const schema = z.object({
  name: z.string().trim().max(120),
  password: z.string().min(10, "A password has at least ten characters.").max(128, "That is more than 128 characters."),
});

export function InvitationForm({ id, email, shopName, inviterName, roleWords, need }: InvitationFormProps) {
  const router = useRouter();
  const [failure, setFailure] = useState("");
  const form = useForm({
    resolver: zodResolver(schema),
    defaultValues: { name: "", password: need === "nothing" ? "----------" : "" },
  });
  const { errors, isSubmitting } = form.formState;

  const send = form.handleSubmit(async ({ name, password }) => {
    setFailure("");
    if (need === "account") {
      if (!name) return form.setError("name", { message: "Type your name." }, { shouldFocus: true });
      const made = await postAuth("/api/auth/sign-up/email", { name, email, password });
      if (!made.ok) return form.setError("password", { message: made.message }, { shouldFocus: true });
    }
    if (need === "sign-in") {
      const entered = await postAuth("/api/auth/sign-in/email", { email, password });
      if (!entered.ok)
        return form.setError(
          "password",
          { message: "That password does not go with this e-mail." },
          { shouldFocus: true },
        );
    }
    const joined = await postAuth("/api/auth/organization/accept-invitation", { invitationId: id });
    if (!joined.ok) return setFailure(joined.message || "The invitation could not be taken up. Ask for a new one.");
    router.push("/cases");
    router.refresh();
  });

  return (
    <form className="form" onSubmit={send} noValidate>
      <h1>Join {shopName}</h1>
      <p>
        {inviterName} asks you to work here as {roleWords}. You sign in as {email}.
      </p>
      {need === "account" && (
        <TextInput
          id="name"
          label="Your name"
          autoComplete="name"
          error={errors.name?.message}
          {...form.register("name")}
        />
      )}
      {need !== "nothing" && (
        <TextInput
          id="password"
          type="password"
          label="Password"
          hint={need === "account" ? "At least ten characters." : undefined}
          autoComplete={need === "account" ? "new-password" : "current-password"}
          error={errors.password?.message}
          {...form.register("password")}
        />
      )}
      {failure && (
        <p className="why" role="alert">
          <span className="bang" aria-hidden="true">
            !
          </span>
          <span>{failure}</span>
        </p>
      )}
      <Button type="submit" busy={isSubmitting} busyLabel="Joining">
        Join {shopName}
      </Button>
    </form>
  );
}
