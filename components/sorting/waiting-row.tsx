import Link from "next/link";
import { PileSwatch } from "@/components/ui/pile-swatch";
import { formatCode } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import { dayOf, daysBetween, instant } from "@/lib/core/time";
import type { WaitingBag } from "@/lib/sorting/contract/waiting";
import { CONDITION_NAMES } from "@/lib/weighing/terms";
import { PATTERNS } from "../stock/patterns";
import { photoAddress } from "../uploads/photo-address";

type Props = { bag: WaitingBag; ticked: boolean; onTick: (ticked: boolean) => void };

function ageWords(weighedAt: number): string {
  // Ages in whole days by this device's calendar: a hint for the eye, never a figure.
  const zone = Intl.DateTimeFormat().resolvedOptions().timeZone;
  const days = daysBetween(dayOf(instant(weighedAt), zone), dayOf(instant(Date.now()), zone));
  if (days <= 0) return "today";
  return days === 1 ? "yesterday" : `${days} days ago`;
}

/** "Likely blue HDPE"; null when nothing but "mixed" was said. */
function likelyWords({ polymer, colour }: WaitingBag): string | null {
  const words = [
    ...(colour ? [colour.name.toLowerCase()] : []),
    ...(polymer !== null && POLYMER_NAMES[polymer].resinCode !== null
      ? [POLYMER_NAMES[polymer].name]
      : []),
  ];
  return words.length === 0 ? null : `Likely ${words.join(" ")}`;
}

/** One bag that waits; a tap on it starts sorting, a tick puts it with others. */
export function WaitingRow({ bag, ticked, onTick }: Props) {
  const code = formatCode(bag.code);
  const likely = likelyWords(bag);
  const age = ageWords(bag.weighedAt);
  const condition = bag.condition === null ? null : CONDITION_NAMES[bag.condition].toLowerCase();
  return (
    <li className="flex items-center gap-2 border-b border-rule py-2 pr-4 pl-1.5 last:border-0">
      <label className="grid size-12 shrink-0 cursor-pointer place-items-center has-disabled:cursor-not-allowed">
        <input
          type="checkbox"
          checked={ticked}
          disabled={bag.draft !== null}
          onChange={(event) => onTick(event.target.checked)}
          aria-label={`Sort ${code} with others`}
          className="size-6 cursor-pointer accent-act disabled:cursor-not-allowed"
        />
      </label>
      {bag.photoId !== null ? (
        <img
          src={photoAddress(bag.photoId, "thumb")}
          alt=""
          width={44}
          height={44}
          loading="lazy"
          decoding="async"
          className="size-11 shrink-0 rounded-control border border-rule object-cover"
        />
      ) : bag.colour ? (
        <PileSwatch hex={bag.colour.hex} pattern={PATTERNS[bag.colour.look]} />
      ) : (
        <span className="size-11 shrink-0 max-wide:hidden" />
      )}
      <Link
        href={bag.draft ? `/sorting/table/${bag.draft.id}` : `/sorting/${bag.code}`}
        prefetch={false}
        className="min-w-0 grow py-1 no-underline wide:grid wide:grid-cols-[9rem_minmax(0,1.2fr)_minmax(0,1fr)_minmax(0,1fr)] wide:items-baseline wide:gap-x-4"
      >
        <span className="block font-mono font-bold tracking-tighter text-act underline decoration-1 underline-offset-3">
          {code}
        </span>
        <span className="block break-words">{bag.pointName ?? "Not known"}</span>
        <span className="block text-sm text-soft">
          {[age, condition].filter((word) => word !== null).join(", ")}
        </span>
        <span className="block text-sm text-soft">
          {likely}
          {bag.alone && !bag.draft ? (
            <strong className="mt-0.5 block w-fit rounded-plate bg-act-soft px-1.5 text-ink">
              Sort this one alone
            </strong>
          ) : null}
          {bag.draft ? (
            <strong className="mt-0.5 block w-fit rounded-plate bg-warn-soft px-1.5 text-warn">
              On the table of {bag.draft.who}
            </strong>
          ) : null}
        </span>
      </Link>
      <span className="shrink-0 font-mono text-lg font-bold whitespace-nowrap">
        {formatKg(bag.netGrams)}
        <span className="sr-only"> kg</span>
      </span>
    </li>
  );
}
