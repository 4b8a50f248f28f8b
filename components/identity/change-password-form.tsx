"use client";

import { useState, type SubmitEvent } from "react";
import { UNANSWERED_SENTENCE } from "@/components/forms/unanswered";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import type { changePasswordEndpoint } from "@/lib/identity/contract";
import { LEAST_PASSWORD } from "@/lib/identity/terms";
import { PasswordField } from "./password-field";
import { typedText } from "./typed-text";
import { useReady } from "./use-ready";

const ADDRESS = { method: "POST", path: "/api/account/password" } as const;

/** "and 2 other sessions were ended" */
function endedWords(count: number): string {
  if (count === 0) return "No other session was open.";
  return count === 1 ? "One other session was ended." : `${count} other sessions were ended.`;
}

/** Needs the present password; every other session ends. */
export function ChangePasswordForm({ email }: { email: string }) {
  const ready = useReady();
  const change = useCommand<typeof changePasswordEndpoint>(ADDRESS);
  const [ended, setEnded] = useState<number | null>(null);

  async function submit(event: SubmitEvent<HTMLFormElement>) {
    event.preventDefault();
    if (change.pending) return;
    const form = event.currentTarget;
    setEnded(null);
    const result = await change.send({
      present: typedText(form, "present"),
      password: typedText(form, "password"),
    });
    if (result.kind !== "done") return;
    setEnded(result.receipt.sessionsEnded);
    form.reset();
  }

  const { fieldErrors } = change;
  const refusal = change.unreachable ? UNANSWERED_SENTENCE : change.problem?.detail;
  return (
    <form method="post" onSubmit={submit} className="flex flex-col gap-4">
      {ended !== null ? (
        <Notice tone="ok" live="status" title="Your password is changed">
          {endedWords(ended)}
        </Notice>
      ) : null}
      {refusal && !fieldErrors.password && !fieldErrors.present ? (
        <Notice tone="bad" live="alert" title={change.unreachable ? "No answer" : "Not changed"}>
          {refusal}
        </Notice>
      ) : null}
      <input type="email" name="email" value={email} autoComplete="username" readOnly hidden />
      <PasswordField
        name="present"
        label="Present password"
        autoComplete="current-password"
        error={fieldErrors.present}
        required
      />
      <PasswordField
        name="password"
        label="New password"
        autoComplete="new-password"
        hint={`At least ${LEAST_PASSWORD} characters. A few words in a row are easy to keep.`}
        error={fieldErrors.password}
        required
      />
      <Button type="submit" disabled={!ready} busy={change.pending}>
        Change password
      </Button>
    </form>
  );
}
