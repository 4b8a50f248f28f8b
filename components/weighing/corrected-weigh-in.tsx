import { ButtonLink } from "@/components/ui/button-link";
import { Notice } from "@/components/ui/notice";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import type { CorrectWeighInReceipt } from "@/lib/weighing/contract/corrections";
import { LaterUsesList } from "../ledger/later-uses-list";

type Props = { receipt: CorrectWeighInReceipt; timeZone: string };

/** What a correction did, with the later uses by name. */
export function CorrectedWeighIn({ receipt, timeZone }: Props) {
  const { code, netGrams, replacementId, later } = receipt;
  return (
    <div className="grid gap-4 rail:max-w-xl">
      <Notice tone="ok" title={replacementId ? "Corrected" : "Taken back"} live="status">
        {netGrams === null
          ? `Bag ${formatCode(code)} counts as not weighed in.`
          : `Bag ${formatCode(code)} now counts ${formatKg(netGrams)} kg.`}{" "}
        Both records stay in its history.
      </Notice>
      {later.count > 0 ? (
        <Notice tone="warn" title="Used before it was corrected">
          These stay as they are.
          <LaterUsesList later={later} timeZone={timeZone} />
        </Notice>
      ) : null}
      <div className="flex flex-wrap gap-2.5 max-wide:*:grow">
        {replacementId ? (
          <ButtonLink href={`/weigh-ins/${replacementId}`}>See what stands now</ButtonLink>
        ) : (
          <ButtonLink href={`/bags/${code}`}>See the bag</ButtonLink>
        )}
      </div>
    </div>
  );
}
