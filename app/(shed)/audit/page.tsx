import type { Metadata } from "next";
import { AuditForm } from "@/components/audit/audit-form";
import { AuditTable } from "@/components/audit/audit-table";
import { ButtonLink } from "@/components/ui/button-link";
import { PageHeader } from "@/components/ui/page-header";
import { listActors, searchAudit } from "@/lib/audit/queries";
import { readAuditQuery } from "@/lib/audit/rules";
import { pageContext } from "@/lib/http/page-context";
import { requireScheme } from "@/lib/platform/scheme";

export const metadata: Metadata = { title: "Audit" };

export default async function AuditPage({ searchParams }: PageProps<"/audit">) {
  const ctx = await pageContext("audit.read");
  const query = readAuditQuery(await searchParams);
  const { rows, next } = searchAudit(ctx, query);
  return (
    <>
      <PageHeader
        title="Audit"
        lead="Every action on people, points, settings, lots and entries: who, when, and what changed."
        actions={
          <ButtonLink href="/audit/ledger" variant="quiet">
            Verify the ledger
          </ButtonLink>
        }
      />
      <AuditForm query={query} actors={listActors(ctx)} />
      <AuditTable
        rows={rows}
        next={next}
        query={query}
        timeZone={requireScheme(ctx.db.reader).timeZone}
      />
    </>
  );
}
