"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { DataTable, type Column } from "@/components/ui/data-table";
import type { PersonView } from "@/lib/identity/contract";
import { ROLE_NAMES } from "@/lib/identity/terms";
import { PersonDialog } from "./person-dialog";

/** How an invitation stands, in words. */
function stateWords(person: PersonView): string {
  if (person.state === "joined") return "Has joined";
  if (person.inviteMail === "failed") return "Invited; the mail could not be delivered";
  if (person.inviteMail === "waiting") return "Invited; the mail is waiting to go out";
  return "Invited, has not joined yet";
}

/** An address breaks after its "@" if it must, and only then anywhere. */
function emailCell({ email }: PersonView) {
  const at = email.indexOf("@") + 1;
  return (
    <span className="wrap-anywhere">
      {email.slice(0, at)}
      <wbr />
      {email.slice(at)}
    </span>
  );
}

/** Everybody, by name; "Change" opens what can be done with one. */
export function PeopleTable({ people }: { people: readonly PersonView[] }) {
  const [openId, setOpenId] = useState<string | null>(null);
  const open = people.find((person) => person.id === openId);
  const columns: readonly Column<PersonView>[] = [
    {
      key: "name",
      header: "Name",
      head: true,
      cell: (person) => <span className="break-words">{person.name}</span>,
    },
    { key: "email", header: "Mail address", cell: emailCell },
    { key: "role", header: "Role", cell: (person) => ROLE_NAMES[person.role] },
    { key: "state", header: "State", cell: stateWords },
    {
      key: "change",
      header: <span className="sr-only">Change</span>,
      cell: (person) => (
        <Button
          variant="quiet"
          size="small"
          aria-label={`Change ${person.name}`}
          onClick={() => setOpenId(person.id)}
        >
          Change
        </Button>
      ),
    },
  ];
  return (
    <>
      <DataTable caption="People" columns={columns} rows={people} rowKey={(person) => person.id} />
      {open ? <PersonDialog key={open.id} person={open} onClose={() => setOpenId(null)} /> : null}
    </>
  );
}
