"use client";

import { useRouter } from "next/navigation";
import { useId, useState, type SubmitEvent } from "react";
import { UNANSWERED_SENTENCE } from "@/components/forms/unanswered";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Notice } from "@/components/ui/notice";
import { SelectField } from "@/components/ui/select-field";
import { TextField } from "@/components/ui/text-field";
import { ROLES, type Role } from "@/lib/core/permissions";
import type { invitePersonEndpoint } from "@/lib/identity/contract";
import { ROLE_NAMES } from "@/lib/identity/terms";
import { typedText } from "./typed-text";

const ADDRESS = { method: "POST", path: "/api/people" } as const;
const ROLE_OPTIONS = ROLES.map((role) => ({ value: role, label: ROLE_NAMES[role] }));

/** "Invite somebody": name, address, role; the mail brings a link to set a password. */
export function InviteDialog() {
  const router = useRouter();
  const formId = useId();
  const invite = useCommand<typeof invitePersonEndpoint>(ADDRESS);
  const [open, setOpen] = useState(false);
  const [invited, setInvited] = useState<string | null>(null);

  async function submit(event: SubmitEvent<HTMLFormElement>) {
    event.preventDefault();
    if (invite.pending) return;
    const form = event.currentTarget;
    const email = typedText(form, "email");
    const result = await invite.send({
      name: typedText(form, "name"),
      email,
      role: typedText(form, "role") as Role,
    });
    if (result.kind !== "done") return;
    setInvited(email);
    setOpen(false);
    router.refresh();
  }

  const { fieldErrors } = invite;
  const refusal = invite.unreachable ? UNANSWERED_SENTENCE : invite.problem?.detail;
  return (
    <>
      <Button
        onClick={() => {
          invite.reset();
          setInvited(null);
          setOpen(true);
        }}
      >
        Invite somebody
      </Button>
      <p role="status" className="basis-full text-sm font-bold text-ok empty:hidden">
        {invited === null ? "" : `A mail with a link is on its way to ${invited}.`}
      </p>
      <Dialog
        open={open}
        onClose={() => setOpen(false)}
        title="Invite somebody"
        actions={
          <Button type="submit" form={formId} busy={invite.pending}>
            Send invitation
          </Button>
        }
      >
        <form id={formId} onSubmit={submit} className="flex flex-col gap-4">
          {refusal && Object.keys(fieldErrors).length === 0 ? (
            <Notice tone="bad" live="alert" title={invite.unreachable ? "No answer" : "Not sent"}>
              {refusal}
            </Notice>
          ) : null}
          <TextField name="name" label="Name" maxLength={100} error={fieldErrors.name} required />
          <TextField
            name="email"
            label="Mail address"
            type="email"
            inputMode="email"
            autoComplete="off"
            autoCapitalize="none"
            error={fieldErrors.email}
            required
          />
          <SelectField
            name="role"
            label="Role"
            options={ROLE_OPTIONS}
            defaultValue="volunteer"
            hint="Donors see their own point, volunteers weigh and sort, leads also correct, coordinators run the scheme."
            error={fieldErrors.role}
          />
        </form>
      </Dialog>
    </>
  );
}
