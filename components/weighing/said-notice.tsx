"use client";

import Link from "next/link";
import { UNREACHABLE_SENTENCE } from "@/components/forms/problem-document";
import { Notice } from "@/components/ui/notice";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg, formatMilligrams } from "@/lib/core/mass";
import type { Instant } from "@/lib/core/time";
import { whenWords } from "@/lib/weighing/rules";
import type { KeptReceipt } from "./save-ticket";
import type { Said } from "./use-weigh-in";

/** What became of the last save: what was kept, what to look at, what to do. */
export function SaidNotice({ said, zone }: { said: Said | null; zone: string }) {
  if (!said) return null;
  if (said.kind === "waiting") {
    return (
      <Notice tone="warn" title="Saved on this phone" live="status" className="mb-3">
        {said.label}: no receipt from the server yet. It is sent by itself, also after this page was
        closed and opened again; weigh on.
      </Notice>
    );
  }
  if (said.kind === "refused") {
    return (
      <Notice
        tone="bad"
        title={said.sentence === UNREACHABLE_SENTENCE ? "No answer" : "Not saved"}
        live="alert"
        className="mb-3"
        action={
          said.signIn ? (
            <Link
              href={{ pathname: "/sign-in", query: { next: "/weigh-in" } }}
              className="link inline-flex min-h-11 items-center font-bold"
            >
              Sign in
            </Link>
          ) : null
        }
      >
        {said.sentence}
      </Notice>
    );
  }
  return <ReceiptNotice receipt={said.receipt} zone={zone} />;
}

function ReceiptNotice({ receipt, zone }: { receipt: KeptReceipt; zone: string }) {
  const what = `${formatCode(receipt.code)}, ${formatKg(receipt.netGrams)} kg`;
  if (receipt.kind === "kept-for-review") {
    const { who, when, netGrams } = receipt.earlier;
    return (
      <Notice tone="warn" title="Weighed already" live="status" className="mb-3">
        {formatCode(receipt.code)} was weighed by {who} on {whenWords(when as Instant, zone)}:{" "}
        {formatKg(netGrams)} kg. That one counts. Your reading of {formatKg(receipt.netGrams)} kg is
        kept for review.
      </Notice>
    );
  }
  const changed = receipt.tareChanges[0];
  return (
    <Notice tone="ok" title="Saved" live="status" className="mb-3">
      {what}
      {receipt.lot
        ? `. It is in lot ${receipt.lot.number}, which now holds ${formatKg(receipt.lot.grams)} kg.`
        : ", to sort."}
      {receipt.belowMinimum ? " It was under what the scale weighs well, and is marked." : ""}
      {changed
        ? ` The list has another weight for the ${changed.part}, ${formatMilligrams(changed.usedMilligrams)} kg, and that was used.`
        : ""}
    </Notice>
  );
}
