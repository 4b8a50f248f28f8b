import type { Metadata } from "next";
import { LedgerCheck } from "@/components/ledger/ledger-check";
import { PageHeader } from "@/components/ui/page-header";
import { pageContext } from "@/lib/http/page-context";
import { ledgerHead } from "@/lib/ledger/queries/entries";
import { getLastVerification } from "@/lib/ledger/queries/last-verification";
import { requireScheme } from "@/lib/platform/scheme";

export const metadata: Metadata = { title: "The ledger" };

export default async function LedgerPage() {
  const ctx = await pageContext("ledger.verify");
  return (
    <>
      <PageHeader
        title="The ledger"
        lead="Each entry carries the fingerprint of the one before it. Verifying reads every entry again, from the first, and rebuilds every balance and total from it."
      />
      <LedgerCheck
        initial={getLastVerification(ctx)}
        head={ledgerHead(ctx.db.reader)}
        timeZone={requireScheme(ctx.db.reader).timeZone}
      />
    </>
  );
}
