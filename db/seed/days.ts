/** Day by day: bags come in on collection days, are weighed, and are sorted some days later. */
import type { LabelCode } from "@/lib/core/bag-code";
import { AppError } from "@/lib/core/errors";
import { addDays, dayOf, instant, type Day, type Instant } from "@/lib/core/time";
import { closeSorting } from "@/lib/sorting/commands/close";
import { undoWeighIn } from "@/lib/weighing/commands/undo-weigh-in";
import { weighBag } from "@/lib/weighing/commands/weigh-bag";
import type { Cast, Shed, Tools } from "./cast";
import { checkScales, workshopDay, type Works } from "./workshop";
import { MATERIALS, REJECTS, type StoryMaterial } from "./story";

export type Waiting = { code: LabelCode; netGrams: number; shed: Shed; sortOn: Day };
type Span = { firstDay: Day; now: Instant; timeZone: string };

/** Weekdays on which bags are fetched, and on which people sort (0 = Sunday). */
const COLLECTING = [2, 5];
const SORTING = [3, 6];
const STEP = 5;
const ROUND_TO_STEP = (grams: number): number => Math.max(STEP, Math.round(grams / STEP) * STEP);

const weekday = (day: Day): number => new Date(`${day}T12:00:00Z`).getUTCDay();
const at = (day: Day, hour: number, minute: number): Instant =>
  instant(Date.parse(`${day}T00:00:00Z`) + (hour * 60 + minute) * 60_000);

/** Winter is quiet, summer is busy; schools the other way round. */
function season(day: Day, summer: number): number {
  const angle = ((Number(day.slice(5, 7)) - 1) / 12) * 2 * Math.PI;
  const warmth = (1 - Math.cos(angle)) / 2;
  return 0.85 + (summer - 0.85) * warmth;
}

/** Runs the story to its last moment. @returns bags that wait for sorting then */
export function fillShed(
  cast: Cast,
  sheds: readonly Shed[],
  tools: Tools,
  works: Works,
  span: Span,
): Waiting[] {
  let waiting: Waiting[] = [];
  const lastDay = dayOf(span.now, span.timeZone);
  for (let day = span.firstDay; day <= lastDay; day = addDays(day, 1)) {
    const today = day === lastDay;
    const opening = at(day, 8, 40);
    const atWork = [...COLLECTING, ...SORTING].includes(weekday(day)) || today;
    if (atWork && opening < span.now) checkScales(cast, works, opening);
    // On its last day the shed is at work whatever the weekday, so that Today has something to show.
    if (COLLECTING.includes(weekday(day)) || today) {
      waiting.push(...collect(cast, sheds, tools, day, span, today));
    }
    if (SORTING.includes(weekday(day)) || today) {
      waiting = sortDue(cast, waiting, tools, day, span);
    }
    workshopDay(cast, tools, works, day, span.now);
  }
  return waiting;
}

function collect(
  cast: Cast,
  sheds: readonly Shed[],
  tools: Tools,
  day: Day,
  span: Span,
  today: boolean,
): Waiting[] {
  const { random } = cast;
  const found: Waiting[] = [];
  let minute = today ? Math.max(5, minutesOf(span.now) - 95) : 9 * 60 + random.int(30);
  for (const shed of sheds) {
    const mean = (shed.story.bagsPerWeek / COLLECTING.length) * season(day, shed.story.summer);
    const bags = today
      ? random.chance(0.55)
        ? 1
        : 0
      : Math.max(0, Math.round(random.normal(mean, 0.75)));
    for (let bag = 0; bag < bags; bag += 1) {
      const when = at(day, 0, minute);
      minute += 2 + random.int(4);
      const code = shed.codes.pop() as LabelCode | undefined;
      if (!code || when >= span.now) continue;
      const weighed = weigh(cast, shed, tools, code, when);
      if (weighed) found.push({ ...weighed, sortOn: addDays(day, 1 + random.int(6)) });
    }
  }
  return found;
}

const minutesOf = (moment: Instant): number => Math.floor((moment % 86_400_000) / 60_000);

function weigh(
  cast: Cast,
  shed: Shed,
  tools: Tools,
  code: LabelCode,
  when: Instant,
): Omit<Waiting, "sortOn"> | null {
  const { random } = cast;
  const who = random.pick(cast.volunteers);
  const ctx = cast.as(who, "volunteer", instant(when + 40_000));
  const net = ROUND_TO_STEP(
    Math.min(11_000, shed.story.bagGrams * Math.exp(random.normal(-0.08, 0.4))),
  );
  const crate = random.chance(0.6) ? tools.tares["Grey crate"] : undefined;
  const sack = random.chance(0.7)
    ? tools.tares[random.chance(0.7) ? "Paper sack" : "Mesh sack"]
    : undefined;
  const tare = (crate?.milligrams ?? 0) + (sack?.milligrams ?? 0);
  const oneKind = random.chance(0.07);
  const material = random.weighted(MATERIALS.slice(0, 8));
  const input = {
    requestId: cast.requestId(ctx.now),
    code,
    scaleId: tools.bench,
    occurredAt: when,
    readings: [
      {
        grossMilligrams: net * 1000 + tare,
        containerId: crate?.id ?? null,
        containerTareMilligrams: crate?.milligrams ?? 0,
        sackId: sack?.id ?? null,
        sackTareMilligrams: sack?.milligrams ?? 0,
      },
    ],
    polymer: oneKind ? material.polymer : ("mixed" as const),
    kind: oneKind ? material.kind : null,
    colourCode: oneKind ? material.colour : null,
    oneKind,
    condition: random.weighted([
      ["clean", 82],
      ["dirty", 11],
      ["wet", 7],
    ] as const),
    pointId: null,
    helperId: null,
    confirmed: ["far-above-usual" as const],
  };
  const receipt = weighBag(ctx, input);
  if (receipt.kind !== "posted") return null;
  if (random.chance(0.008)) {
    // A slip of the finger, noticed at once and weighed again.
    const soon = cast.as(who, "volunteer", instant(when + 100_000));
    undoWeighIn(soon, { requestId: cast.requestId(soon.now), id: receipt.weighInId as never });
    const again = cast.as(who, "volunteer", instant(when + 160_000));
    weighBag(again, { ...input, requestId: cast.requestId(again.now) });
  } else if (random.chance(0.006)) {
    // Somebody scans a bag that was weighed an hour ago: kept for review.
    const later = cast.as(random.pick(cast.volunteers), "volunteer", instant(when + 3_600_000));
    weighBag(later, { ...input, requestId: cast.requestId(later.now), occurredAt: later.now });
  }
  return oneKind ? null : { code, netGrams: receipt.netGrams, shed };
}

function sortDue(
  cast: Cast,
  waiting: readonly Waiting[],
  tools: Tools,
  day: Day,
  span: Span,
): Waiting[] {
  const left: Waiting[] = [];
  let minute = 13 * 60 + cast.random.int(20);
  let table: Waiting[] = [];
  for (const bag of waiting) {
    const when = at(day, 0, minute);
    if (bag.sortOn > day || when >= span.now) {
      left.push(bag);
      continue;
    }
    table.push(bag);
    // Mostly one bag alone; now and then a few of them are tipped together.
    if (table.length < 4 && cast.random.chance(0.16)) continue;
    minute += 3 + cast.random.int(4);
    sort(cast, table, tools, when);
    table = [];
  }
  left.push(...table);
  return left;
}

/** Splits what was tipped over what is usual in a bag, rejects included, as read on the scale in its steps. */
function sort(cast: Cast, bags: readonly Waiting[], tools: Tools, when: Instant): void {
  const [first] = bags;
  if (!first) return;
  const { random } = cast;
  const bag = { ...first, netGrams: bags.reduce((sum, { netGrams }) => sum + netGrams, 0) };
  const wet = random.chance(0.04);
  const missing = wet ? bag.netGrams * (0.01 + random.next() * 0.02) : random.normal(0, 3);
  const rejectShare = Math.max(0, random.normal(bag.shed.story.rejectShare, 0.03));
  const kept = bag.netGrams * (1 - rejectShare);
  const materials = pickMaterials(cast, Math.min(6, 2 + random.int(4), Math.ceil(kept / 150)));
  const weights = materials.map(() => 0.2 + random.next());
  const sum = weights.reduce((total, weight) => total + weight, 0);
  const shares = weights.map((weight) => ROUND_TO_STEP((kept * weight) / sum));
  const rejected =
    Math.round((bag.netGrams - missing - shares.reduce((a, b) => a + b, 0)) / STEP) * STEP;
  if (rejected < 0) shares[0] = ROUND_TO_STEP((shares[0] ?? 0) + rejected);

  const tray = tools.tares["Sorting tray"];
  const reading = (grams: number) => ({
    grossMilligrams: grams * 1000 + (tray?.milligrams ?? 0),
    containerId: tray?.id ?? null,
    containerTareMilligrams: tray?.milligrams ?? 0,
    sackId: null,
    sackTareMilligrams: 0,
  });
  const ctx = cast.as(random.pick(cast.volunteers), "volunteer", instant(when + 60_000));
  const input = {
    requestId: cast.requestId(ctx.now),
    codes: bags.map(({ code }) => code),
    scaleId: tools.bench,
    occurredAt: when,
    piles: materials.map((material, index) => ({
      polymer: material.polymer,
      colourCode: material.colour,
      kind: material.kind,
      form: "whole" as const,
      wash: "as-received" as const,
      lot: null,
      reading: reading(shares[index] ?? STEP),
    })),
    rejects: rejected > 0 ? [{ reason: random.weighted(REJECTS), reading: reading(rejected) }] : [],
    cause: null,
    confirmedAbove: false,
  };
  try {
    closeSorting(ctx, input);
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    // Beyond what the scale can tell: weighed again it stays so, and one tap says why.
    if (error.code === "sum-beyond-tolerance")
      closeSorting(ctx, { ...input, cause: wet ? "liquid" : "dirt" });
    else if (error.code === "sum-far-above-net")
      closeSorting(ctx, { ...input, confirmedAbove: true });
    else throw error;
  }
}

function pickMaterials(cast: Cast, count: number): StoryMaterial[] {
  const found = new Map<string, StoryMaterial>();
  for (let tries = 0; found.size < Math.max(1, count) && tries < 40; tries += 1) {
    const material = cast.random.weighted(MATERIALS);
    found.set(`${material.polymer}/${material.kind}/${material.colour}`, material);
  }
  return [...found.values()];
}
