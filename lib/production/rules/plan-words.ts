/** Invariant: what the planner says in words names the grams, pieces and days that its figures show. */
import { formatKg } from "@/lib/core/mass";
import { formatDay } from "@/lib/core/time";
import { STEP_KIND_NAMES } from "@/lib/stock/terms";
import { shareWords } from "@/lib/stock/rules/own-loss";
import type { ColourStock } from "../contract/plans";
import type { Caution, ColourNeed, Due } from "./enough";
import { LEAST_WEEKS } from "./enough";
import type { Unfit } from "./feedstock";
import { inGrams } from "./working";

/** "about 12 May 2026 (7 to 20 May 2026)" */
export function dueWords({ day, early, late }: Due): string {
  const range = late
    ? `${formatDay(early)} to ${formatDay(late)}`
    : `${formatDay(early)} at the best, in poor weeks not to be foreseen`;
  return `about ${formatDay(day)} (${range})`;
}

/** When a short colour should be there, or why nothing can be said. */
export function arrivalWords({ colour, due }: ColourNeed): string {
  if (due) return `${colour.name} should be there ${dueWords(due)} at the usual intake.`;
  return colour.weeks.length < LEAST_WEEKS
    ? `${colour.name}: too little history to say when; it takes ${LEAST_WEEKS} full weeks.`
    : `${colour.name} hardly ever comes in: no day can be named.`;
}

/** "Shredding 4.200 kg would add 4.116 kg of blue." */
export function stepWords(
  colour: Pick<ColourStock, "name">,
  after: ColourStock["afterSteps"][number],
): string {
  const steps = after.steps.map((step) => STEP_KIND_NAMES[step].toLowerCase());
  const named =
    steps.length > 1 ? `${steps.slice(0, -1).join(", ")} and ${steps.at(-1)}` : steps[0];
  const words = `${named} ${formatKg(after.grams)} kg would add ${formatKg(after.gives)} kg of ${colour.name.toLowerCase()}.`;
  return words.charAt(0).toUpperCase() + words.slice(1);
}

export function cautionWords(caution: Caution): string {
  if (caution.kind === "flow") {
    return "Lids and bottles flow differently: joined in one melt they may streak or part. Try a few first.";
  }
  return `${shareWords(caution.thousandths / 1000)} of this was heated before; the piece takes at most ${shareWords(caution.mostThousandths / 1000)}.`;
}

export function unfitWords(unfit: Unfit): string {
  if (unfit.why === "sheet-too-large") return "The sheet does not fit the plate either way round.";
  if (unfit.why === "shot-too-large") {
    return `One shot takes ${inGrams(unfit.shotMilligrams)}, and the barrel gives ${inGrams(unfit.fillMilligrams)}.`;
  }
  return `One shot takes ${inGrams(unfit.shotMilligrams)}, less than the ${inGrams(unfit.leastShotMilligrams)} that the machine needs at least.`;
}
