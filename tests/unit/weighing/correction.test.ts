import { describe, expect, it } from "vitest";
import { replacementOf, taresOf, valuesOfWeighIn } from "@/components/weighing/corrected-values";
import { readForm } from "@/components/weighing/read-form";
import { readWhen, whenText } from "@/components/weighing/when-text";
import { newId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import type { WeighInPage } from "@/lib/weighing/contract/corrections";

const at = (iso: string) => instant(Date.parse(iso));

describe("day and clock of the shed", () => {
  it("stand in its own zone, and an unchanged minute keeps its seconds", () => {
    const before = at("2026-07-01T12:05:42.123Z");
    const text = whenText(before, "Europe/Paris");
    expect(text).toEqual({ day: "2026-07-01", clock: "14:05" });
    expect(readWhen(text, "Europe/Paris", before)).toBe(before);
    expect(readWhen({ ...text, clock: "09:30" }, "Europe/Paris", before)).toBe(
      at("2026-07-01T07:30:00Z"),
    );
  });

  it("hold on the days when clocks are changed", () => {
    const before = at("2026-01-01T00:00:00Z");
    for (const [day, clock, iso] of [
      ["2026-03-29", "01:30", "2026-03-29T00:30:00Z"],
      ["2026-03-29", "15:00", "2026-03-29T13:00:00Z"],
      ["2026-10-25", "15:00", "2026-10-25T14:00:00Z"],
    ] as const) {
      expect(readWhen({ day, clock }, "Europe/Paris", before)).toBe(at(iso));
    }
  });

  it("are refused when they are none", () => {
    const before = at("2026-01-01T00:00:00Z");
    expect(readWhen({ day: "", clock: "10:00" }, "UTC", before)).toBeNull();
    expect(readWhen({ day: "2026-02-30", clock: "10:00" }, "UTC", before)).toBeNull();
    expect(readWhen({ day: "2026-02-03", clock: "25:00" }, "UTC", before)).toBeNull();
  });
});

describe("a saved weigh-in in the form", () => {
  const scaleId = newId<"scale">();
  const crate = newId<"container">();
  const gone = newId<"container">();
  const weighIn: WeighInPage = {
    id: newId(),
    code: "K7Q29F4M",
    scaleId,
    pointId: newId<"point">(),
    occurredAt: at("2026-05-06T10:00:00Z"),
    recordedAt: at("2026-05-06T10:00:01Z"),
    readings: [
      {
        grossMilligrams: 2_310_000,
        containerId: crate,
        containerTareMilligrams: 150_000,
        sackId: null,
        sackTareMilligrams: 0,
      },
      {
        grossMilligrams: 1_000_000,
        containerId: gone,
        containerTareMilligrams: 200_000,
        sackId: null,
        sackTareMilligrams: 12_500,
      },
    ],
    polymer: "PP",
    kind: null,
    colourCode: "white",
    oneKind: false,
    condition: "dirty",
    state: "posted",
    netGrams: 2948,
    basis: "unchecked",
    belowMinimum: false,
    pointName: "Quay café",
    scaleName: "Bench scale",
    colourName: "White",
    lotNumber: null,
    byName: "Ada",
    corrects: null,
    correction: null,
    later: { uses: [], count: 0 },
  };
  const listed = [
    { id: crate, kind: "container" as const, name: "Crate", tareMilligrams: 155_000 },
  ];
  const scale = {
    name: "Bench scale",
    class: "III" as const,
    maxMilligrams: 30_000_000,
    eMilligrams: 5_000,
    dMilligrams: 500,
    statedAccuracyMilligrams: null,
  };

  it("comes back as it was saved when nothing is changed", () => {
    const values = valuesOfWeighIn(weighIn, listed);
    expect(values.readings[0]?.container.choice).toBe(crate);
    // What is in no list any more stands as its weight.
    expect(values.readings[1]).toMatchObject({
      container: { choice: "typed", text: "0.200" },
      sack: { choice: "typed", text: "0.0125" },
    });
    const read = readForm(values, scale, taresOf(listed, weighIn));
    if (!read.ok) throw new Error(JSON.stringify(read.problems));
    // The crate was weighed anew since; this weigh-in keeps what it had then.
    expect(read.netGrams).toBe(2948);
    const { scaleId: _s, ...same } = replacementOf(values, read, weighIn.occurredAt);
    expect(same).toMatchObject({
      pointId: weighIn.pointId,
      occurredAt: weighIn.occurredAt,
      polymer: "PP",
      kind: null,
      colourCode: "white",
      oneKind: false,
      condition: "dirty",
    });
  });
});
