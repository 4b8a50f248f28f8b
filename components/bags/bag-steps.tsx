import { BAG_STATES, type BagState } from "@/lib/bags/terms";

const STEPS: readonly { reached: BagState; label: string }[] = [
  { reached: "picked-up", label: "Brought to the shed" },
  { reached: "weighed", label: "Weighed in" },
  { reached: "sorted", label: "Sorted" },
];

/** How far a bag has come: a filled dot for what is done, an empty one for what is to come. */
export function BagSteps({ state, since }: { state: BagState; since: string }) {
  const at = BAG_STATES.indexOf(state);
  return (
    <ol className="mt-5">
      {STEPS.map(({ reached, label }) => {
        const done = at >= BAG_STATES.indexOf(reached);
        return (
          <li
            key={reached}
            className="flex items-baseline gap-4 border-b border-rule py-3.5 last:border-b-0 last:pb-1"
          >
            <span
              aria-hidden
              className={`size-4 shrink-0 translate-y-0.5 rounded-full border-2 ${done ? "border-ink bg-ink" : "border-edge"}`}
            />
            <span className="grow">
              <span className={done ? "font-bold" : "text-soft"}>{label}</span>
              <span className="block text-sm text-soft">
                {state === reached ? since : done ? "Done" : "Not yet"}
              </span>
            </span>
          </li>
        );
      })}
    </ol>
  );
}
