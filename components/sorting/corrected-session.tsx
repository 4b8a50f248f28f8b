import { ButtonLink } from "@/components/ui/button-link";
import { Notice } from "@/components/ui/notice";
import type { CorrectSortingReceipt } from "@/lib/sorting/contract/sortings";
import { LaterUsesList } from "../ledger/later-uses-list";

type Props = { receipt: CorrectSortingReceipt; timeZone: string };

/** What a correction did, with the later uses by name. */
export function CorrectedSession({ receipt: { receipt, later, codes }, timeZone }: Props) {
  return (
    <div className="grid gap-4 rail:max-w-3xl">
      <Notice tone="ok" title={receipt ? "Corrected" : "Taken back"} live="status">
        {receipt
          ? "The old record and the new one stand in the history of every bag and lot that they touch."
          : codes.length === 1
            ? "The bag waits again."
            : `${codes.length} bags wait again.`}
      </Notice>
      {later.count > 0 ? (
        <Notice tone="warn" title="Used before it was corrected">
          These stay as they are.
          <LaterUsesList later={later} timeZone={timeZone} />
        </Notice>
      ) : null}
      <div className="flex flex-wrap gap-2.5 max-wide:*:grow">
        {receipt ? (
          <ButtonLink href={`/sorting/sessions/${receipt.sortingId}`}>
            See what stands now
          </ButtonLink>
        ) : (
          <ButtonLink href="/sorting">To the bags that wait</ButtonLink>
        )}
      </div>
    </div>
  );
}
