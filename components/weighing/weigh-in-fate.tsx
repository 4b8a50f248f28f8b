import Link from "next/link";
import { Notice } from "@/components/ui/notice";
import { instant } from "@/lib/core/time";
import type { WeighInPage } from "@/lib/weighing/contract/corrections";
import { whenWords } from "@/lib/weighing/rules";

type Props = { weighIn: WeighInPage; timeZone: string };

const LINK = "link inline-flex min-h-11 items-center font-bold";

/** Whether a weigh-in counts, and what does so in its place; both ways. */
export function WeighInFate({ weighIn, timeZone }: Props) {
  const { state, correction, corrects } = weighIn;
  return (
    <>
      {state === "undone" ? (
        <Notice tone="info" title="Undone">
          Whoever saved it took it back. It does not count.
        </Notice>
      ) : null}
      {state === "discarded" ? (
        <Notice tone="info" title="Set aside">
          It was a second reading of this bag, and does not count.
        </Notice>
      ) : null}
      {state === "for-review" ? (
        <Notice tone="warn" title="Second reading, kept for review">
          The bag was weighed already. This one does not count until a lead or coordinator lets it.
        </Notice>
      ) : null}
      {correction ? (
        <Notice
          tone="warn"
          title={`Corrected by ${correction.byName}, ${whenWords(instant(correction.at), timeZone)}`}
          action={
            correction.replacementId === null ? null : (
              <Link href={`/weigh-ins/${correction.replacementId}`} className={LINK}>
                See what stands in its place
              </Link>
            )
          }
        >
          <span className="wrap-anywhere">{correction.reason ?? "The reason was erased."}</span>
          {correction.replacementId === null ? " Nothing stands in its place." : ""}
        </Notice>
      ) : null}
      {corrects === null ? null : (
        <p>
          It stands in the place of{" "}
          <Link href={`/weigh-ins/${corrects}`} className={LINK}>
            an earlier one
          </Link>
          .
        </p>
      )}
    </>
  );
}
