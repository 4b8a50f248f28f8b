"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { UNANSWERED_SENTENCE } from "@/components/forms/unanswered";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Notice } from "@/components/ui/notice";
import { SelectField } from "@/components/ui/select-field";
import { ROLES, type Role } from "@/lib/core/permissions";
import type {
  changeRoleEndpoint,
  PersonView,
  removePersonEndpoint,
  resendInviteEndpoint,
} from "@/lib/identity/contract";
import { ROLE_NAMES } from "@/lib/identity/terms";

const ROLE = { method: "PUT", path: "/api/people/{personId}/role" } as const;
const INVITE = { method: "POST", path: "/api/people/{personId}/invite" } as const;
const REMOVAL = { method: "POST", path: "/api/people/{personId}/removal" } as const;
const ROLE_OPTIONS = ROLES.map((role) => ({ value: role, label: ROLE_NAMES[role] }));

type PersonDialogProps = { person: PersonView; onClose: () => void };

/** What a coordinator may do with one person: another role, another invitation, removal. */
export function PersonDialog({ person, onClose }: PersonDialogProps) {
  const router = useRouter();
  const [role, setRole] = useState<Role>(person.role);
  const [done, setDone] = useState<string | null>(null);
  const [removing, setRemoving] = useState(false);
  const change = useCommand<typeof changeRoleEndpoint>(ROLE);
  const invite = useCommand<typeof resendInviteEndpoint>(INVITE);
  const remove = useCommand<typeof removePersonEndpoint>(REMOVAL);
  const commands = [change, invite, remove];
  const personId = person.id;

  async function after(sent: Promise<{ kind: string }>, word: string | null) {
    for (const command of commands) command.reset();
    setDone(null);
    const result = await sent;
    if (result.kind !== "done") return;
    router.refresh();
    if (word === null) onClose();
    else setDone(word);
  }

  const unanswered = commands.some((command) => command.unreachable);
  const refusal = unanswered
    ? UNANSWERED_SENTENCE
    : commands.find((command) => command.problem)?.problem?.detail;
  return (
    <Dialog open onClose={onClose} title={person.name}>
      <div className="flex flex-col gap-5">
        {done ? <Notice tone="ok" live="status" title={done} /> : null}
        {refusal ? (
          <Notice tone="bad" live="alert" title={unanswered ? "No answer" : "Not changed"}>
            {refusal}
          </Notice>
        ) : null}
        <div className="flex flex-col gap-3">
          <SelectField
            label="Role"
            options={ROLE_OPTIONS}
            value={role}
            onChange={(event) => setRole(event.target.value as Role)}
            hint="A new role counts from the person's next step."
          />
          <Button
            disabled={role === person.role}
            busy={change.pending}
            onClick={() =>
              void after(change.send({ personId, role }), `Now ${ROLE_NAMES[role].toLowerCase()}`)
            }
          >
            {role === person.role
              ? "Choose another role"
              : `Make ${ROLE_NAMES[role].toLowerCase()}`}
          </Button>
        </div>
        {person.state === "invited" ? (
          <Button
            variant="quiet"
            busy={invite.pending}
            onClick={() => void after(invite.send({ personId }), "A new link is on its way")}
          >
            Send the invitation again
          </Button>
        ) : null}
        <div className="flex flex-col gap-3 border-t border-rule pt-5">
          {removing ? (
            <p>
              {person.name} is signed out everywhere at once and cannot come back without a new
              invitation. What they weighed stays, with their name.
            </p>
          ) : null}
          <Button
            variant="danger"
            busy={remove.pending}
            onClick={() =>
              removing ? void after(remove.send({ personId }), null) : setRemoving(true)
            }
          >
            {removing ? `Remove ${person.name} now` : `Remove ${person.name}`}
          </Button>
        </div>
      </div>
    </Dialog>
  );
}
