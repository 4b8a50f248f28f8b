import type { Metadata } from "next";
import { InviteDialog } from "@/components/identity/invite-dialog";
import { PeopleTable } from "@/components/identity/people-table";
import { PageHeader } from "@/components/ui/page-header";
import { pageContext } from "@/lib/http/page-context";
import { listPeople } from "@/lib/identity/queries";

export const metadata: Metadata = { title: "People" };

export default async function PeoplePage() {
  const ctx = await pageContext("people.manage");
  const { people } = listPeople(ctx);
  return (
    <>
      <PageHeader
        title="People"
        titleInBar
        lead="Who is in the scheme and what they may do. A removal works at once."
        actions={<InviteDialog />}
      />
      <PeopleTable people={people} />
    </>
  );
}
