"use client";

import { UNANSWERED_SENTENCE } from "@/components/forms/unanswered";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import type { signOutEverywhereEndpoint } from "@/lib/identity/contract";

const ADDRESS = { method: "POST", path: "/api/account/sign-out-everywhere" } as const;

/** Ends every session of the account, this one too; for a phone that was lost. */
export function SignOutEverywhere() {
  const everywhere = useCommand<typeof signOutEverywhereEndpoint>(ADDRESS);

  async function end() {
    const result = await everywhere.send({});
    if (result.kind === "done") window.location.assign("/sign-in");
  }

  const refusal = everywhere.unreachable ? UNANSWERED_SENTENCE : everywhere.problem?.detail;
  return (
    <div className="flex flex-col gap-3">
      {refusal ? (
        <Notice
          tone="bad"
          live="alert"
          title={everywhere.unreachable ? "No answer" : "Not signed out"}
        >
          {refusal}
        </Notice>
      ) : null}
      <Button variant="danger" onClick={end} busy={everywhere.pending}>
        Sign out everywhere
      </Button>
    </div>
  );
}
