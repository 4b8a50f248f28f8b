"use client";

import Link from "next/link";
import { useState, type SubmitEvent } from "react";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { TextField } from "@/components/ui/text-field";
import { PasswordField } from "./password-field";
import { requestSignIn } from "./sign-in-request";
import { typedText } from "./typed-text";
import { useReady } from "./use-ready";

type SignInFormProps = {
  /** Where to go afterwards; a path of this program. */
  next: string;
  /** The session ended while somebody worked. */
  ended: boolean;
};

/** Mail address and password. A refusal keeps what was typed. */
export function SignInForm({ next, ended }: SignInFormProps) {
  const ready = useReady();
  const [pending, setPending] = useState(false);
  const [refusal, setRefusal] = useState<string | null>(null);

  async function submit(event: SubmitEvent<HTMLFormElement>) {
    event.preventDefault();
    if (pending) return;
    const form = event.currentTarget;
    setPending(true);
    setRefusal(null);
    const result = await requestSignIn(typedText(form, "email"), typedText(form, "password"));
    // A whole new page, so that nothing of whoever was here before stays in the browser's memory.
    if (result.ok) window.location.assign(next);
    else {
      setRefusal(result.sentence);
      setPending(false);
    }
  }

  return (
    <form method="post" onSubmit={submit} className="flex flex-col gap-4">
      {ended && refusal === null ? (
        <Notice tone="warn" title="Your session has ended">
          What you typed is kept; sign in and you are back where you were.
        </Notice>
      ) : null}
      {refusal !== null ? (
        <Notice tone="bad" live="alert" title="Not signed in">
          {refusal}
        </Notice>
      ) : null}
      <TextField
        name="email"
        label="Mail address"
        type="email"
        inputMode="email"
        autoComplete="username"
        autoCapitalize="none"
        required
      />
      <PasswordField name="password" label="Password" autoComplete="current-password" required />
      <Button type="submit" disabled={!ready} busy={pending}>
        {pending ? "Signing in…" : "Sign in"}
      </Button>
      <p>
        <Link href="/forgotten" className="link inline-flex min-h-11 items-center">
          Forgotten password
        </Link>
      </p>
    </form>
  );
}
