/** The bench's part of the story: scales are checked, lots washed, dried, shredded and counted, loads taken away. */
import type { Id, ScaleId } from "@/lib/core/ids";
import { addDays, daysBetween, instant, type Day, type Instant } from "@/lib/core/time";
import { addDestination } from "@/lib/removals/commands/destinations";
import { enterReceipt } from "@/lib/removals/commands/receipts";
import { takeAway } from "@/lib/removals/commands/take-away";
import { addCheckWeight } from "@/lib/scales/commands/check-weights";
import { checkScale, clearScale } from "@/lib/scales/commands/checks";
import { countLot } from "@/lib/stock/commands/count-lot";
import { identifyLot } from "@/lib/stock/commands/move-lot";
import { acceptCount } from "@/lib/stock/commands/review-count";
import { saveStep } from "@/lib/stock/commands/save-step";
import { getLot } from "@/lib/stock/queries/lots";
import type { StepKind } from "@/lib/stock/terms";
import type { Cast, Tools } from "./cast";

export type Works = {
  weights: { scale: ScaleId; id: Id<"check-weight">; milligrams: number; step: number }[];
  disposal: Id<"destination">;
  recycler: Id<"destination">;
  firstDay: Day;
  /** Receipts that are still to come. */
  due: { removal: Id<"removal">; grams: number; on: Day }[];
};

const BENCH_STEP = 5_000;
const FLOOR_STEP = 20_000;
const BENCH_MOST = 14_000;

/** What the bench is equipped with before the first bag. */
export function equip(cast: Cast, tools: Tools, firstDay: Day, at: Instant): Works {
  const ctx = cast.as(cast.coordinator, "coordinator", at);
  const weight = (name: string, milligrams: number, evidence: string) =>
    addCheckWeight(ctx, {
      requestId: cast.requestId(at),
      name,
      massMilligrams: milligrams,
      evidence,
    }).id;
  const iron = weight("Iron weight, 2 kg", 2_000_000, "Certificate SP-0417");
  const can = weight(
    "Sealed can, 20 kg",
    20_000_000,
    "Weighed on the verified scale of the boatyard",
  );
  const destination = (
    name: string,
    route: "disposed" | "passed-on",
    wasteCode: string,
    permitUntil: Day | null,
  ) =>
    addDestination(ctx, {
      requestId: cast.requestId(at),
      name,
      route,
      receiverNumber: route === "disposed" ? "EW-2207" : "RC-5113",
      carrierName: "Estuary Haulage",
      carrierNumber: "CBD-30941",
      permitUntil,
      wasteCode,
    }).id;
  return {
    weights: [
      { scale: tools.bench, id: iron, milligrams: 2_000_000, step: BENCH_STEP },
      { scale: tools.floor, id: can, milligrams: 20_000_000, step: FLOOR_STEP },
    ],
    disposal: destination("Low Quay transfer station", "disposed", "19 12 12", null),
    recycler: destination("Fenside Reclaim", "passed-on", "19 12 04", addDays(firstDay, 262)),
    firstDay,
    due: [],
  };
}

const hour = (day: Day, of: number, minute = 0): Instant =>
  instant(Date.parse(`${day}T00:00:00Z`) + (of * 60 + minute) * 60_000);

/** A check weight on each scale before the first bag; now and then one fails, and is repeated once. */
export function checkScales(cast: Cast, works: Works, at: Instant): void {
  const { random } = cast;
  const who = cast.as(random.pick(cast.volunteers), "volunteer", at);
  for (const { scale, id, milligrams, step } of works.weights) {
    // A busy morning: nobody thought of it.
    if (random.chance(0.04)) continue;
    const check = (off: number) =>
      checkScale(who, {
        requestId: cast.requestId(at),
        scaleId: scale,
        checkWeightId: id,
        readingMilligrams: milligrams + off * step,
      });
    const drift = Math.round(random.normal(0, 0.45));
    if (!random.chance(0.02)) {
      check(Math.max(-1, Math.min(1, drift)));
      continue;
    }
    check(4);
    if (random.chance(0.6)) check(0);
    else {
      check(3);
      const lead = cast.as(cast.lead, "lead", instant(at + 600_000));
      clearScale(lead, {
        requestId: cast.requestId(lead.now),
        scaleId: scale,
        day: new Date(at).toISOString().slice(0, 10) as Day,
        note: "Feet were not level; set and tried with three loads",
      });
    }
  }
}

type Held = { number: number; lotId: Id<"lot">; grams: number; polymer: string; kind: string };

function lots(
  cast: Cast,
  form: string,
  wash: string,
  least: number,
  polymers: readonly string[],
): Held[] {
  return cast.db.reader.client
    .prepare(
      `select l.number, l.id as lotId, b.grams, r.polymer, r.kind from lots l
         join balances b on b.holder_id = l.holder_id join materials m on m.id = b.material_id
         join "rows" r on r.id = m.row_id
        where m.form = ? and m.wash = ? and b.grams >= ?
          and r.polymer in (${polymers.map(() => "?").join(", ")})
        order by b.grams desc, l.number`,
    )
    .all(form, wash, least, ...polymers) as Held[];
}

const WORKED = ["PE-HD", "PP", "PE-LD", "PS"] as const;

/** A load as one of the scales shows it: small ones on the bench, heavy ones on the floor. */
function weighed(tools: Tools, grams: number) {
  const onBench = grams <= BENCH_MOST;
  const step = onBench ? BENCH_STEP : FLOOR_STEP;
  return {
    scaleId: onBench ? tools.bench : tools.floor,
    reading: {
      grossMilligrams: Math.max(step, Math.round((grams * 1000) / step) * step),
      containerId: null,
      containerTareMilligrams: 0,
      sackId: null,
      sackTareMilligrams: 0,
    },
  };
}

function step(
  cast: Cast,
  tools: Tools,
  kind: StepKind,
  lot: Held,
  keeps: number,
  at: Instant,
): void {
  const lead = cast.as(cast.lead, "lead", at);
  saveStep(lead, {
    requestId: cast.requestId(at),
    kind,
    occurredAt: at,
    minutes: kind === "drying" ? 1_440 : 40 + cast.random.int(60),
    inputs: [{ number: lot.number, amount: { how: "all" }, count: null }],
    outputs: [{ kind: null, colourCode: null, ...weighed(tools, lot.grams * keeps) }],
    losses: [],
    cause: kind === "washing" ? "dirt" : kind === "drying" ? "moisture" : "dust",
    confirmed: true,
  });
}

/** One day of the workshop: Mondays wash, Tuesdays what is damp dries, Thursdays shred, the month's turn counts and clears. */
export function workshopDay(
  cast: Cast,
  tools: Tools,
  works: Works,
  day: Day,
  until: Instant,
): void {
  const { random } = cast;
  const weekday = new Date(`${day}T12:00:00Z`).getUTCDay();
  const nth = daysBetween(works.firstDay, day);
  const at = (of: number, minute = 0) => {
    const when = hour(day, of, minute);
    return when < until ? when : null;
  };
  const morning = at(10, 10);
  if (nth < 21 || !morning) return;
  if (weekday === 1) {
    const [dirty] = lots(cast, "whole", "as-received", 6_000, WORKED);
    if (dirty) step(cast, tools, "washing", dirty, 0.975 + random.next() * 0.02, morning);
  } else if (weekday === 2) {
    const [damp] = lots(cast, "whole", "washed", 1_000, WORKED);
    if (damp) step(cast, tools, "drying", damp, 0.97 + random.next() * 0.015, morning);
  } else if (weekday === 4) {
    const [dry] = lots(cast, "whole", "dry", 1_000, WORKED);
    if (dry) step(cast, tools, "shredding", dry, 0.985 + random.next() * 0.01, morning);
  }
  const afternoon = at(15, 30);
  if (!afternoon) return;
  if (nth % 30 === 12) countSome(cast, tools, afternoon, nth > 200);
  if (nth % 30 === 20) emptyBin(cast, tools, works, day, afternoon);
  if (nth % 45 === 33) passOn(cast, tools, works, day, afternoon);
  if (nth % 40 === 25) identifySome(cast, tools, afternoon);
  for (const { removal, grams, on } of works.due.filter((due) => due.on <= day)) {
    const lead = cast.as(cast.lead, "lead", afternoon);
    enterReceipt(lead, {
      requestId: cast.requestId(afternoon),
      id: removal,
      number: `FR-${String(4000 + nth)}`,
      day: on,
      receivedGrams: Math.round((grams * (0.992 + random.next() * 0.006)) / 10) * 10,
    });
  }
  works.due = works.due.filter((due) => due.on > day);
}

/** Three containers on the scale; a lead looks at the counts later, but at the last ones not yet. */
function countSome(cast: Cast, tools: Tools, at: Instant, last: boolean): void {
  const volunteer = cast.as(cast.random.pick(cast.volunteers), "volunteer", at);
  const found = lots(cast, "whole", "as-received", 800, WORKED).slice(0, 3);
  for (const lot of found) {
    const { scaleId, reading } = weighed(
      tools,
      lot.grams * (1 + cast.random.normal(-0.001, 0.003)),
    );
    const seen = getLot(volunteer, lot.number)?.seen;
    if (!seen) continue;
    const receipt = countLot(volunteer, {
      requestId: cast.requestId(at),
      number: lot.number,
      occurredAt: at,
      counted: { found: "weighed", scaleId, readings: [reading] },
      seen,
      confirmed: false,
    });
    if (last) continue;
    const lead = cast.as(cast.lead, "lead", instant(at + 3_600_000));
    acceptCount(lead, { requestId: cast.requestId(lead.now), id: receipt.countId });
  }
}

function emptyBin(cast: Cast, tools: Tools, works: Works, day: Day, at: Instant): void {
  const grams = cast.db.reader.client
    .prepare(
      `select coalesce(sum(b.grams), 0) from balances b join holders h on h.id = b.holder_id
        where h.kind = 'reject-bin'`,
    )
    .pluck()
    .get() as number;
  if (grams < 2_000) return;
  const { scaleId, reading } = weighed(tools, grams);
  const lead = cast.as(cast.lead, "lead", at);
  takeAway(lead, {
    requestId: cast.requestId(at),
    destinationId: works.disposal,
    day,
    noteNumber: `LQ-${day.replaceAll("-", "").slice(2)}`,
    taking: {
      how: "weighed",
      scaleId,
      loads: [{ lotNumber: null, whole: true, readings: [reading] }],
    },
    confirmedAbove: true,
  });
}

/** PET is baled for a recycler: nobody here can dry and press it. The receipt comes some days later. */
function passOn(cast: Cast, tools: Tools, works: Works, day: Day, at: Instant): void {
  const bottles = lots(cast, "whole", "as-received", 1_500, ["PET"]).slice(0, 4);
  if (bottles.length === 0) return;
  const lead = cast.as(cast.lead, "lead", at);
  const receipt = takeAway(lead, {
    requestId: cast.requestId(at),
    destinationId: works.recycler,
    day,
    noteNumber: `EH-${day.replaceAll("-", "").slice(2)}`,
    taking: { how: "book", loads: bottles.map(({ number }) => ({ lotNumber: number })) },
    confirmedAbove: true,
  });
  works.due.push({ removal: receipt.id, grams: receipt.grams, on: addDays(day, 9) });
}

function identifySome(cast: Cast, tools: Tools, at: Instant): void {
  const [unknown] = lots(cast, "whole", "as-received", 400, ["not-sure"]);
  if (!unknown) return;
  const volunteer = cast.as(cast.random.pick(cast.volunteers), "volunteer", at);
  const { scaleId, reading } = weighed(tools, unknown.grams * 0.4);
  identifyLot(volunteer, {
    requestId: cast.requestId(at),
    number: unknown.number,
    occurredAt: at,
    count: null,
    amount: { how: "taken", scaleId, readings: [reading], all: false },
    polymer: "PP",
    kind: "tubs",
    colourCode: "white",
    method: cast.random.pick(["code", "float"] as const),
  });
}
