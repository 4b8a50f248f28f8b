import Link from "next/link";
import { QueryProvider } from "@/components/forms/query-provider";
import { ButtonLink } from "@/components/ui/button-link";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { Ticket } from "@/components/ui/ticket";
import { WeightDisplay } from "@/components/ui/weight-display";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import { dayOf, instant } from "@/lib/core/time";
import type { WeighInPage } from "@/lib/weighing/contract/corrections";
import { whenWords } from "@/lib/weighing/rules";
import { LaterUsesList } from "../ledger/later-uses-list";
import { RecordPhotos } from "../uploads/record-photos";
import { WeighInFacts } from "./weigh-in-facts";
import { WeighInFate } from "./weigh-in-fate";

type Props = {
  weighIn: WeighInPage;
  timeZone: string;
  helperId: string;
  mayCorrect: boolean;
  mayRemovePhotos: boolean;
};

/** One weigh ticket with everything that was typed, and what became of it. */
export function WeighInRecord({ weighIn, timeZone, helperId, mayCorrect, mayRemovePhotos }: Props) {
  const { id, code, state, netGrams, later, byName, occurredAt, pointName } = weighIn;
  const counts = state === "posted";
  return (
    <QueryProvider>
      <PageHeader
        title={`Weigh-in of ${formatCode(code)}`}
        lead={pointName}
        back={{ href: `/bags/${code}`, label: "Back to the bag" }}
      />
      <div className="grid items-start gap-4 rail:grid-cols-2">
        <div className="grid min-w-0 gap-4">
          <WeighInFate weighIn={weighIn} timeZone={timeZone} />
          <Ticket
            as="section"
            label="Weigh ticket"
            stub={
              <>
                <WeightDisplay
                  label="Net"
                  value={formatKg(netGrams)}
                  tone={counts ? "ok" : "soft"}
                  largest={60}
                />
                <p className="mt-1 text-sm text-soft">
                  {whenWords(occurredAt, timeZone)}, {byName}
                </p>
              </>
            }
          >
            <WeighInFacts weighIn={weighIn} timeZone={timeZone} />
          </Ticket>
          <div className="flex flex-wrap gap-2.5 max-wide:*:grow">
            {mayCorrect && counts ? (
              <ButtonLink href={`/weigh-ins/${id}/correct`}>Correct</ButtonLink>
            ) : null}
            {mayCorrect && state === "for-review" ? (
              <ButtonLink href="/weigh-ins/for-review">Decide about it</ButtonLink>
            ) : null}
            <ButtonLink href={`/bags/${code}`} variant="quiet">
              See the bag
            </ButtonLink>
          </div>
          {!mayCorrect && counts ? (
            <p className="text-sm text-soft">
              Something wrong? A lead or coordinator corrects it; tell one of them.
            </p>
          ) : null}
        </div>
        <div className="grid min-w-0 gap-4">
          {later.count > 0 && state !== "undone" ? (
            <Notice tone="info" title="Used since">
              <LaterUsesList later={later} timeZone={timeZone} />
            </Notice>
          ) : null}
          <RecordPhotos
            kind="weigh-in"
            id={id}
            label="Photos of this weigh-in"
            facts={{
              what: `Bag ${formatCode(code)}`,
              grams: netGrams,
              day: dayOf(instant(occurredAt), timeZone),
              timeZone,
            }}
            helperId={helperId}
            mayRemove={mayRemovePhotos}
          />
        </div>
      </div>
      <p className="mt-6">
        <Link href="/today" className="link inline-flex min-h-11 items-center font-bold">
          To today&rsquo;s tickets
        </Link>
      </p>
    </QueryProvider>
  );
}
