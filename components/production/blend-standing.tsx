import { formatKg } from "@/lib/core/mass";
import type { PlanStock } from "@/lib/production/contract/plans";
import type { Share } from "@/lib/production/rules/blend";
import { cautionsOf, judgeBlend, piecesFromFree, wouldDo } from "@/lib/production/rules/enough";
import type { Need } from "@/lib/production/rules/feedstock";
import { planFor, type PlanParts } from "@/lib/production/rules/plan";
import { arrivalWords, cautionWords, stepWords } from "@/lib/production/rules/plan-words";

type Props = { parts: PlanParts; need: Need; shares: readonly Share[]; stock: PlanStock };

/** The most pieces that the question "how many does it make" is asked for. */
const MOST = 100_000;

/** Is there enough? By colour: need, free, short; and what could be done where it is short. */
export function BlendStanding({ parts, need, shares, stock }: Props) {
  const needs = judgeBlend(need.grams, shares, stock);
  const short = needs.filter(({ shortGrams }) => shortGrams > 0);
  const gramsFor = (pieces: number): number => {
    const plan = planFor(pieces, parts);
    return plan.kind === "lacks" ? 0 : plan.need.grams;
  };
  const makes = piecesFromFree(gramsFor, shares, stock, MOST);
  const noun = parts.piece.method === "pressing" ? "sheets" : "pieces";
  const cautions = cautionsOf(needs, parts.piece.mostHeatedThousandths);
  return (
    <section aria-label="Is there enough?" className="mt-5">
      <table className="w-full">
        <caption className="sr-only">Needed and free by colour, in kilograms</caption>
        <thead className="text-left text-xs text-soft">
          <tr>
            <th scope="col" className="pb-1 font-bold">
              Colour
            </th>
            <th scope="col" className="pb-1 text-right font-bold">
              Needs
            </th>
            <th scope="col" className="pb-1 text-right font-bold">
              Free
            </th>
            <th scope="col" className="pb-1 pl-3">
              <span className="sr-only">Enough?</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {needs.map(({ colour, grams, shortGrams }) => (
            <tr key={colour.code} className="border-t border-rule">
              <th scope="row" className="py-2 text-left font-bold wrap-anywhere">
                {colour.name}
              </th>
              <td className="py-2 text-right font-mono whitespace-nowrap">{formatKg(grams)}</td>
              <td className="py-2 text-right font-mono whitespace-nowrap">
                {formatKg(colour.freeGrams)}
                {colour.reservedGrams > 0 ? (
                  <span className="block text-xs text-soft">
                    + {formatKg(colour.reservedGrams)} reserved
                  </span>
                ) : null}
              </td>
              <td
                className={`py-2 pl-3 font-bold whitespace-nowrap ${shortGrams > 0 ? "text-warn" : "text-ok"}`}
              >
                {shortGrams > 0 ? `short ${formatKg(shortGrams)}` : "enough"}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <div role="status" className="mt-3 grid gap-1">
        {short.length > 0 ? (
          <p>
            Enough for{" "}
            <strong className="font-mono text-lg tracking-tighter whitespace-nowrap">
              {makes.toLocaleString("en").replaceAll(",", "\u2009")}
            </strong>{" "}
            {noun} now.
          </p>
        ) : (
          <p>
            Enough for all of it; the free stock makes{" "}
            <strong className="font-mono tracking-tighter whitespace-nowrap">
              {makes.toLocaleString("en").replaceAll(",", "\u2009")}
            </strong>{" "}
            {noun} in this blend.
          </p>
        )}
        {short.map((colourNeed) => {
          const others = wouldDo(colourNeed, shares, stock).slice(0, 3);
          return (
            <div key={colourNeed.colour.code}>
              <p>{arrivalWords(colourNeed)}</p>
              {colourNeed.colour.afterSteps.map((after) => (
                <p key={after.steps.join()}>{stepWords(colourNeed.colour, after)}</p>
              ))}
              {others.length > 0 ? (
                <p>{others.map(({ name }) => name).join(" or ")} would do in full.</p>
              ) : null}
            </div>
          );
        })}
      </div>
      {cautions.map((caution) => (
        <p key={caution.kind} className="mt-2 font-bold text-warn">
          {cautionWords(caution)}
        </p>
      ))}
    </section>
  );
}
