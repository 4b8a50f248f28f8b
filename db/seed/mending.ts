/** What was put right afterwards, and what is not finished: corrections, and a sorting that was put aside. */
import { newId, type SortingId, type WeighInId } from "@/lib/core/ids";
import { instant, type Instant } from "@/lib/core/time";
import { correctSorting } from "@/lib/sorting/commands/correct";
import { saveDraft } from "@/lib/sorting/commands/drafts";
import { correctWeighIn } from "@/lib/weighing/commands/correct";
import { getStoredWeighIn } from "@/lib/weighing/queries/stored";
import { setLimits } from "@/lib/stock/commands/limits";
import type { Cast, Shed, Tools } from "./cast";

const DAY_MS = 86_400_000;

/** A weigh-in whose crate was read twice, a sorting that belongs to nobody's bag, and today's unfinished table. */
export function mend(cast: Cast, tools: Tools, sheds: readonly Shed[], now: Instant): void {
  const db = cast.db.reader.client;
  const setting = cast.as(cast.coordinator, "coordinator", instant(now - 30 * DAY_MS));
  setLimits(setting, {
    requestId: cast.requestId(setting.now),
    lotWeeks: 16,
    storageKg: 1_500,
    storageDays: 365,
    reservationDays: 14,
  });
  const lead = cast.as(cast.lead, "lead", instant(now - DAY_MS));
  const wrong = db
    .prepare(
      `select id from weigh_ins where state = 'posted' and net_grams > 3000 and recorded_at < ?
        order by recorded_at desc limit 1`,
    )
    .pluck()
    .get(now - 3 * DAY_MS) as WeighInId | undefined;
  const stored = wrong && getStoredWeighIn(cast.db.reader, wrong);
  if (wrong && stored) {
    const { scaleId, occurredAt, polymer, kind, colourCode, oneKind, condition, pointId } = stored;
    correctWeighIn(lead, {
      requestId: cast.requestId(lead.now),
      id: wrong,
      reason: "The pencilled ticket says 60 g less; the crate stood on the edge of the pan",
      replacement: {
        scaleId,
        occurredAt,
        polymer,
        kind,
        colourCode,
        oneKind,
        condition,
        pointId,
        readings: stored.readings.map((reading, at) =>
          at === 0 ? { ...reading, grossMilligrams: reading.grossMilligrams - 60_000 } : reading,
        ),
      },
    });
  }
  const sorted = db
    .prepare(
      `select id from sorting_sessions where state = 'closed' and recorded_at < ? order by recorded_at desc limit 1`,
    )
    .pluck()
    .get(now - 5 * DAY_MS) as SortingId | undefined;
  if (sorted) {
    correctSorting(lead, {
      requestId: cast.requestId(lead.now),
      id: sorted,
      reason: "Sorted under the wrong tag; the bag is on the table again",
      replacement: null,
    });
  }
  const codes = db
    .prepare("select code from bags where state = 'weighed' order by state_since limit 3")
    .pluck()
    .all() as Parameters<typeof saveDraft>[1]["codes"];
  const [, helper] = cast.volunteers;
  if (codes.length > 0 && helper) {
    const at = instant(now - 25 * 60_000);
    saveDraft(cast.as(helper, "volunteer", at), {
      id: newId<"sorting">(at),
      version: 0,
      codes,
      content: "",
    });
  }
}
