import { Ticket } from "@/components/ui/ticket";
import { formatKg } from "@/lib/core/mass";
import { dayOf, formatDay, type Day } from "@/lib/core/time";
import type { ReceiptView, RemovalView } from "@/lib/removals/queries/removal-page";
import { CorrectReceipt } from "./correct-receipt";
import { ReceiptForm } from "./receipt-form";
import { UndoRecord } from "./undo-record";

type Props = {
  removal: Pick<RemovalView, "id" | "grams">;
  /** null: it is unproven. */
  receipt: ReceiptView | null;
  today: Day;
  timeZone: string;
  mayRecord: boolean;
};

/** The receipt that proves what was passed on, or the form for it. */
export function ReceiptTicket({ removal, receipt, today, timeZone, mayRecord }: Props) {
  if (receipt === null) {
    return (
      <Ticket as="section" label="Receipt">
        <h2 className="text-xl">No receipt yet</h2>
        <p className="mt-1 mb-4 text-soft">
          Until the receiver confirms it, it counts as passed on, unproven.
        </p>
        {mayRecord ? <ReceiptForm removalId={removal.id} today={today} /> : null}
      </Ticket>
    );
  }
  const day = dayOf(receipt.occurredAt, timeZone);
  const off = receipt.receivedGrams - removal.grams;
  return (
    <Ticket as="section" label="Receipt">
      <h2 className="text-xl wrap-anywhere">Receipt {receipt.number}</h2>
      <p className="mt-1">
        Proven from {formatDay(day)} on. The receiver weighed{" "}
        <span className="font-mono font-bold">{formatKg(receipt.receivedGrams)}</span> kg
        {off === 0
          ? ", the same as here."
          : `, ${formatKg(Math.abs(off))} kg ${off > 0 ? "more" : "less"} than here. What counts as gone is what was recorded here.`}
      </p>
      {mayRecord ? (
        <div className="mt-4 flex flex-wrap gap-2.5">
          {receipt.undoUntil === null ? null : (
            <UndoRecord removalId={removal.id} receiptId={receipt.id} until={receipt.undoUntil} />
          )}
          <CorrectReceipt removalId={removal.id} receipt={receipt} day={day} today={today} />
        </div>
      ) : null}
    </Ticket>
  );
}
