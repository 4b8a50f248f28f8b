import Link from "next/link";
import { QueryProvider } from "@/components/forms/query-provider";
import { ButtonLink } from "@/components/ui/button-link";
import { PageHeader } from "@/components/ui/page-header";
import { Ticket } from "@/components/ui/ticket";
import type { Bag } from "@/lib/bags/queries";
import { BAG_STATE_NAMES } from "@/lib/bags/terms";
import { formatCode } from "@/lib/core/bag-code";
import { dayOf, formatDay } from "@/lib/core/time";
import type { SortedBag } from "@/lib/sorting/contract/sortings";
import type { BagWeighIn } from "@/lib/weighing/queries/weigh-ins";
import { BagCodes } from "./bag-codes";
import { ShedBagSorted } from "./shed-bag-sorted";
import { ShedBagWeighing } from "./shed-bag-weighing";

type Props = {
  bag: Bag;
  /** Every code that opens it, the first one first. */
  codes: readonly string[];
  mayTag: boolean;
  weighIns: readonly BagWeighIn[];
  sorted: SortedBag | null;
  timeZone: string;
  /** Whose session this is: photos that wait on a phone are sent in it only. */
  helperId: string;
  mayRemovePhotos: boolean;
};

/** One bag as the shed knows it: where it came from, its weighings with their photos, what it was sorted into. */
export function ShedBag({
  bag,
  codes,
  mayTag,
  weighIns,
  sorted,
  timeZone,
  helperId,
  mayRemovePhotos,
}: Props) {
  const lots = weighIns.flatMap(({ lotNumber }) => (lotNumber === null ? [] : [lotNumber]));
  return (
    <QueryProvider>
      <PageHeader
        title={`Bag ${formatCode(bag.code)}`}
        lead={bag.pointName ?? "No drop-off point yet"}
        back={{ href: "/today", label: "Back to today" }}
        actions={
          bag.state === "weighed" ? (
            <ButtonLink href={`/sorting/${bag.code}`}>Sort this bag</ButtonLink>
          ) : null
        }
      />
      <div className="grid items-start gap-4 rail:grid-cols-2">
        <div className="grid min-w-0 gap-4">
          <p>
            <span className="text-soft">State</span>{" "}
            <strong>
              {BAG_STATE_NAMES[bag.state]}, since {formatDay(dayOf(bag.stateSince, timeZone))}
            </strong>
          </p>
          <BagCodes codes={codes} mayTag={mayTag && bag.state !== "closed"} />
          {weighIns.length === 0 ? (
            <Ticket>
              <p className="text-soft">
                It was not weighed in yet. Photos are added when it is, or here afterwards.
              </p>
            </Ticket>
          ) : (
            weighIns.map((weighIn, at) => (
              <ShedBagWeighing
                key={weighIn.id}
                weighIn={weighIn}
                at={at + 1}
                of={weighIns.length}
                timeZone={timeZone}
                helperId={helperId}
                mayRemovePhotos={mayRemovePhotos}
              />
            ))
          )}
        </div>
        {sorted ? (
          <ShedBagSorted sorted={sorted} timeZone={timeZone} />
        ) : lots.length > 0 ? (
          <p>
            It was one kind and went straight into{" "}
            {lots.map((number) => (
              <Link
                key={number}
                href={`/stock/lots/${number}`}
                className="link inline-flex min-h-11 items-center font-bold"
              >
                lot {number}
              </Link>
            ))}
          </p>
        ) : null}
      </div>
    </QueryProvider>
  );
}
