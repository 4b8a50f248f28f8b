import { TONE_TEXT, type Tone } from "@/components/ui/figure";
import { formatKg } from "@/lib/core/mass";
import type { StepSumsSoFar } from "./step-draft";

function restWords({ verdict, toleranceMilligrams }: StepSumsSoFar): { words: string; tone: Tone } {
  const size = Math.abs(verdict.differenceGrams);
  const kg = formatKg(size);
  if (verdict.kind === "within") {
    if (size === 0) return { words: "All of it is accounted for.", tone: "ok" };
    const side = verdict.differenceGrams > 0 ? "missing" : "more";
    return { words: `${size} g ${side}, within what the scale can tell.`, tone: "ok" };
  }
  if (verdict.kind === "gain") {
    return { words: `${kg} kg more than went in: water, or as confirmed.`, tone: "ok" };
  }
  if (verdict.kind === "loss") return { words: `${kg} kg lost, cause named.`, tone: "ok" };
  if (verdict.kind === "needs-cause") {
    const can = formatKg(Math.floor(toleranceMilligrams / 1000));
    return { words: `${kg} kg are missing; the scale can explain ${can} kg.`, tone: "warn" };
  }
  return { words: `${kg} kg more came out than went in.`, tone: "warn" };
}

/** What went in, what came out, what was lost, and the rest in words. */
export function StepSum({ sums }: { sums: StepSumsSoFar }) {
  const { words, tone } = restWords(sums);
  const total = Math.max(sums.inGrams, sums.outGrams + sums.lostGrams, 1);
  const part = (grams: number) => `${((grams / total) * 100).toFixed(3)}%`;
  return (
    <section aria-label="What it comes to" className="mb-4">
      <p className="mb-2 flex flex-wrap items-baseline gap-x-3">
        <span className="font-mono text-4xl font-bold">{formatKg(sums.outGrams)}</span>
        <span className="font-mono text-lg font-bold">of {formatKg(sums.inGrams)} kg</span>
      </p>
      <div aria-hidden className="flex h-6 gap-0.5 overflow-hidden rounded-plate bg-well">
        <span style={{ width: part(sums.outGrams) }} className="block bg-ink" />
        <span style={{ width: part(sums.lostGrams) }} className="block bg-soft" />
      </div>
      <p aria-live="polite" className={`mt-2 ${TONE_TEXT[tone]}`}>
        {sums.outGrams === 0 ? "Weigh what came out." : words}
        {sums.lostGrams > 0 ? ` ${formatKg(sums.lostGrams)} kg lost by name.` : ""}
      </p>
    </section>
  );
}
