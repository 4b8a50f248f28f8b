import Link from "next/link";
import { Notice } from "@/components/ui/notice";
import type { SortingPage } from "@/lib/sorting/queries/session-page";
import { whenWords } from "@/lib/weighing/rules";

const LINK = "link inline-flex min-h-11 items-center font-bold";

/** Whether a session still stands, and what does so in its place; both ways. */
export function SessionFate({ session, timeZone }: { session: SortingPage; timeZone: string }) {
  const { state, correction, corrects } = session;
  return (
    <>
      {state === "undone" ? (
        <Notice tone="info" title="Undone">
          Its bags wait again.
        </Notice>
      ) : null}
      {correction ? (
        <Notice
          tone="warn"
          title={`Corrected by ${correction.byName}, ${whenWords(correction.at, timeZone)}`}
          action={
            correction.replacementId === null ? null : (
              <Link href={`/sorting/sessions/${correction.replacementId}`} className={LINK}>
                See what stands in its place
              </Link>
            )
          }
        >
          <span className="wrap-anywhere">{correction.reason ?? "The reason was erased."}</span>
          {correction.replacementId === null
            ? " Nothing stands in its place; its bags waited again."
            : ""}
        </Notice>
      ) : null}
      {corrects === null ? null : (
        <p>
          It stands in the place of{" "}
          <Link href={`/sorting/sessions/${corrects}`} className={LINK}>
            an earlier one
          </Link>
          .
        </p>
      )}
    </>
  );
}
