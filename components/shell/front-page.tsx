import { ButtonLink } from "@/components/ui/button-link";
import { Flakes } from "@/components/ui/flakes";
import { formatKg } from "@/lib/core/mass";
import { formatMonth, type Month } from "@/lib/core/time";

type FrontPageProps = {
  schemeName: string;
  month: Month;
  collectedGrams: number;
  acceptedGrams: number;
  piecesGrams: number;
};

/** What the scheme does, where to bring plastic, and this month's three numbers. */
export function FrontPage({
  schemeName,
  month,
  collectedGrams,
  acceptedGrams,
  piecesGrams,
}: FrontPageProps) {
  const monthName = formatMonth(month).split(" ")[0] ?? "";
  const numbers = [
    { label: `Collected in ${monthName}`, grams: collectedGrams },
    { label: "Accepted", grams: acceptedGrams },
    { label: "Made into pieces", grams: piecesGrams },
  ];
  return (
    <>
      <div className="flex max-w-3xl grow flex-col justify-center pt-5 wide:py-6">
        <h1 className="max-w-[13em] text-[2.5rem]/[2.625rem] wide:text-5xl">
          Every gram, from the <span className="whitespace-nowrap">drop-off</span> point to the
          finished piece.
        </h1>
        <p className="mt-5 max-w-[33rem] text-lg/7">
          Bring clean lids, tubs and bottles. {schemeName} weighs them, sorts them and makes things
          from them, and you can see what became of yours.
        </p>
        <div className="mt-7 flex flex-wrap gap-3">
          <ButtonLink href="/points">Find a drop-off point</ButtonLink>
        </div>
        <dl className="mt-9 max-w-[37rem] rounded-ticket border border-rule bg-card wide:grid wide:grid-cols-3">
          {numbers.map((number) => (
            <div
              key={number.label}
              className="flex items-baseline justify-between gap-4 border-dashed border-rule px-5 py-3 not-first:border-t-2 wide:block wide:py-4 wide:not-first:border-t-0 wide:not-first:border-l-2"
            >
              <dt className="text-sm font-bold text-soft wide:text-xs wide:whitespace-nowrap">
                {number.label}
              </dt>
              {/* One decimal: a month's total is the sum of many readings and knows no more. */}
              <dd className="font-mono text-xl font-bold whitespace-nowrap">
                {formatKg(number.grams, 1)}
                <span className="font-body text-base tracking-normal">&nbsp;kg</span>
              </dd>
            </div>
          ))}
        </dl>
      </div>
      <Flakes
        seed={20261201}
        width={640}
        height={800}
        count={430}
        thickest="right"
        largest={34}
        keep="xMaxYMid slice"
        className="absolute inset-y-0 right-0 -z-10 hidden h-full w-1/2 rail:block"
      />
      <Flakes
        seed={31}
        width={360}
        height={88}
        count={80}
        thickest="right"
        largest={19}
        keep="xMaxYMid meet"
        className="-order-1 -mr-4 h-22 max-w-none self-end overflow-visible wide:-mr-12 wide:h-32 rail:hidden"
      />
    </>
  );
}
