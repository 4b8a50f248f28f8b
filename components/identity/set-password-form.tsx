"use client";

import { useState, type SubmitEvent } from "react";
import { UNANSWERED_SENTENCE } from "@/components/forms/unanswered";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { ButtonLink } from "@/components/ui/button-link";
import { Notice } from "@/components/ui/notice";
import type { setPasswordEndpoint } from "@/lib/identity/contract";
import { LEAST_PASSWORD } from "@/lib/identity/terms";
import { PasswordField } from "./password-field";
import { requestSignIn } from "./sign-in-request";
import { typedText } from "./typed-text";
import { useReady } from "./use-ready";

const ADDRESS = { method: "POST", path: "/api/account/set-password" } as const;

type SetPasswordFormProps = { token: string; email: string };

/** Opening the page changes nothing; only this form uses the link up. Then it signs in at once. */
export function SetPasswordForm({ token, email }: SetPasswordFormProps) {
  const ready = useReady();
  const set = useCommand<typeof setPasswordEndpoint>(ADDRESS);
  const [state, setState] = useState<"typing" | "signing-in" | "set">("typing");

  async function submit(event: SubmitEvent<HTMLFormElement>) {
    event.preventDefault();
    if (set.pending || state !== "typing") return;
    const password = typedText(event.currentTarget, "password");
    const result = await set.send({ token, password });
    if (result.kind !== "done") return;
    setState("signing-in");
    const signedIn = await requestSignIn(email, password);
    // The sign-in page leads whoever is signed in to where their role begins.
    if (signedIn.ok) window.location.assign("/sign-in");
    else setState("set");
  }

  if (state === "set") {
    return (
      <Notice
        tone="ok"
        live="status"
        title="Your password is set"
        action={<ButtonLink href="/sign-in">Sign in</ButtonLink>}
      />
    );
  }
  const refusal = set.unreachable ? UNANSWERED_SENTENCE : set.problem?.detail;
  return (
    <form method="post" onSubmit={submit} className="flex flex-col gap-4">
      {refusal && !set.fieldErrors.password ? (
        <Notice tone="bad" live="alert" title={set.unreachable ? "No answer" : "Not set"}>
          {refusal}
        </Notice>
      ) : null}
      {/* For password managers: they keep the password under this name. */}
      <input type="email" name="email" value={email} autoComplete="username" readOnly hidden />
      <PasswordField
        name="password"
        label="New password"
        autoComplete="new-password"
        hint={`At least ${LEAST_PASSWORD} characters. A few words in a row are easy to keep.`}
        error={set.fieldErrors.password}
        required
      />
      <Button type="submit" disabled={!ready} busy={set.pending || state === "signing-in"}>
        Set password and sign in
      </Button>
    </form>
  );
}
