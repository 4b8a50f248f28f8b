"use client";

import { useState, type SubmitEvent } from "react";
import { UNANSWERED_SENTENCE } from "@/components/forms/unanswered";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { TextField } from "@/components/ui/text-field";
import type { forgottenPasswordEndpoint } from "@/lib/identity/contract";
import { typedText } from "./typed-text";
import { useReady } from "./use-ready";

const ADDRESS = { method: "POST", path: "/api/account/forgotten" } as const;

/** Asks for a link by mail. The answer is the same whether the account exists or not. */
export function ForgottenForm() {
  const ready = useReady();
  const ask = useCommand<typeof forgottenPasswordEndpoint>(ADDRESS);
  const [sentTo, setSentTo] = useState<string | null>(null);

  async function submit(event: SubmitEvent<HTMLFormElement>) {
    event.preventDefault();
    if (ask.pending) return;
    const email = typedText(event.currentTarget, "email");
    setSentTo(null);
    const result = await ask.send({ email });
    if (result.kind === "done") setSentTo(email);
  }

  const refusal = ask.unreachable ? UNANSWERED_SENTENCE : ask.problem?.detail;
  return (
    <form method="post" onSubmit={submit} className="flex flex-col gap-4">
      <p className="text-soft">You get a mail with a link. It works once and for a day.</p>
      {sentTo !== null ? (
        <Notice tone="ok" live="status" title="Look into your mail">
          If somebody with the address {sentTo} is here, a mail is on its way. It may lie in the
          folder for unwanted mail.
        </Notice>
      ) : null}
      {refusal && !ask.fieldErrors.email ? (
        <Notice tone="bad" live="alert" title={ask.unreachable ? "No answer" : "Not sent"}>
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
        error={ask.fieldErrors.email}
        required
      />
      <Button type="submit" disabled={!ready} busy={ask.pending}>
        Send me a link
      </Button>
    </form>
  );
}
