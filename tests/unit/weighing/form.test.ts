import { describe, expect, it } from "vitest";
import * as addresses from "@/components/weighing/addresses";
import { agoWords, bagAge } from "@/components/weighing/bag-words";
import {
  emptyReading,
  isTouched,
  nextForm,
  TYPED,
  valuesOf,
  type FormValues,
} from "@/components/weighing/form-values";
import {
  formField,
  inputOf,
  netSoFar,
  readForm,
  readingRefusal,
  readTare,
} from "@/components/weighing/read-form";
import { giveSpareTagEndpoint } from "@/lib/bags/contract";
import { newId } from "@/lib/core/ids";
import { instant } from "@/lib/core/time";
import { listPointsEndpoint } from "@/lib/points/contract";
import { listContainersEndpoint } from "@/lib/scales/contract/containers";
import { listScalesEndpoint } from "@/lib/scales/contract/scales";
import { listColoursEndpoint } from "@/lib/stock/contract/palette";
import { weighInInputSchema } from "@/lib/weighing/contract/weigh-ins";
import type { NamedScale } from "@/lib/scales/rules/reading";

const SCALE: NamedScale = {
  name: "Bench scale",
  class: "III",
  maxMilligrams: 15_000_000,
  eMilligrams: 5_000,
  dMilligrams: 5_000,
  statedAccuracyMilligrams: null,
};
const CRATE = {
  id: newId<"container">(),
  kind: "container" as const,
  name: "Crate",
  tareMilligrams: 160_000,
};
const SACK = {
  id: newId<"container">(),
  kind: "sack" as const,
  name: "Sack",
  tareMilligrams: 20_000,
};
const LISTED = [CRATE, SACK];
const SCALE_ID = newId<"scale">();

const form = (more: Partial<FormValues> = {}): FormValues => ({
  ...nextForm(SCALE_ID),
  code: "1111-1115",
  readings: [
    {
      gross: "2.340",
      container: { choice: CRATE.id, text: "" },
      sack: { choice: TYPED, text: "20 g" },
    },
  ],
  ...more,
});
const problems = (values: FormValues): Readonly<Record<string, string>> => {
  const read = readForm(values, SCALE, LISTED);
  if (read.ok) throw new Error("nothing is wrong");
  return read.problems;
};

describe("reading the form", () => {
  it("comes to milligrams and net grams", () => {
    expect(readForm(form(), SCALE, LISTED)).toMatchObject({
      ok: true,
      code: "11111115",
      netGrams: 2160,
      readings: [
        {
          grossMilligrams: 2_340_000,
          containerId: CRATE.id,
          sackId: null,
          sackTareMilligrams: 20_000,
        },
      ],
    });
  });

  it("shows the net of what is typed so far", () => {
    expect(netSoFar([emptyReading()], LISTED)).toBeNull();
    expect(netSoFar([...form().readings, emptyReading()], LISTED)).toBe(2160);
    expect(netSoFar([{ ...emptyReading(form().readings[0]), gross: "0.1" }], LISTED)).toBe(-80);
  });

  it("names every field that keeps it from being saved", () => {
    expect(problems({ ...form(), code: "", readings: [emptyReading()] })).toEqual({
      code: "Scan the tag, or type its code.",
      "readings.0.gross": "Type what the scale shows.",
    });
    expect(problems(form({ code: "1111-1116" })).code).toContain("no code of a tag here");
    const [first = emptyReading()] = form().readings;
    expect(problems(form({ readings: [first, { ...first, gross: "1,234" }] }))).toHaveProperty(
      ["readings.1.gross"],
      expect.stringContaining("could be a thousand"),
    );
    expect(
      problems(form({ readings: [{ ...first, sack: { choice: TYPED, text: "-1" } }] })),
    ).toHaveProperty(["readings.0.sack.text"]);
    const without = readForm(form(), undefined, LISTED);
    expect(without).toMatchObject({ ok: false, problems: { scaleId: "Choose the scale." } });
  });

  it("wants polymer, kind and colour of a bag of one kind", () => {
    expect(problems(form({ oneKind: true }))).toHaveProperty("polymer");
    expect(problems(form({ oneKind: true, polymer: "PP" }))).toHaveProperty("kind");
    expect(problems(form({ oneKind: true, polymer: "PP", kind: "lids" }))).toHaveProperty(
      "colourCode",
    );
  });

  it("says what the scale cannot have shown while it is typed, and nothing of half a figure", () => {
    const [first = emptyReading()] = form().readings;
    expect(readingRefusal({ ...first, gross: "2.343" }, LISTED, SCALE)).toContain("steps of 5 g");
    expect(readingRefusal({ ...first, gross: "" }, LISTED, SCALE)).toBeNull();
  });

  it("takes a tare that left the list as unknown, an empty typed one as none", () => {
    expect(readTare({ choice: "gone", text: "" }, LISTED)).toMatchObject({ ok: false });
    expect(readTare({ choice: TYPED, text: " " }, LISTED)).toMatchObject({
      ok: true,
      milligrams: 0,
    });
  });

  it("finds the form's field for the contract's", () => {
    expect(formField(["readings", 0, "grossMilligrams"])).toBe("readings.0.gross");
    expect(formField(["readings", 2, "sackId"])).toBe("readings.2.sack.text");
    expect(formField(["colourCode"])).toBe("colourCode");
  });
});

describe("what is sent", () => {
  const sent = (values: FormValues) => {
    const read = readForm(values, SCALE, LISTED);
    if (!read.ok) throw new Error(JSON.stringify(read.problems));
    return inputOf(values, read, {
      requestId: newId(),
      occurredAt: 1000,
      helperId: newId(),
      confirmed: [],
    });
  };

  it("is what the contract takes", () => {
    expect(weighInInputSchema.parse(sent(form()))).toMatchObject({ code: "11111115", kind: null });
    const one = form({ oneKind: true, polymer: "PP", kind: "lids", colourCode: "blue" });
    expect(weighInInputSchema.parse(sent(one))).toMatchObject({ oneKind: true, kind: "lids" });
  });

  it("comes back into the form as it was, when a ticket is changed by hand", () => {
    const values = form({ condition: "wet", colourCode: "blue" });
    const back = valuesOf(sent(values));
    expect(readForm(back, SCALE, LISTED)).toEqual(readForm(values, SCALE, LISTED));
    expect(back).toMatchObject({ condition: "wet", colourCode: "blue", scaleId: SCALE_ID });
  });
});

describe("the next bag", () => {
  it("keeps scale and tares and forgets the bag", () => {
    const next = nextForm(SCALE_ID, form().readings[0]);
    expect(next).toMatchObject({ code: "", scaleId: SCALE_ID, polymer: "mixed", oneKind: false });
    expect(next.readings).toEqual([{ ...form().readings[0], gross: "" }]);
    expect(isTouched(next)).toBe(false);
    expect(isTouched({ ...next, photos: true })).toBe(true);
    expect(next.id).not.toBe(form().id);
    expect(isTouched(form())).toBe(true);
  });
});

describe("words", () => {
  it("say how long ago by the calendar", () => {
    const now = instant(Date.UTC(2026, 4, 6, 1));
    const at = (hours: number) => instant(now - hours * 3_600_000);
    expect([at(0), at(2), at(26)].map((since) => agoWords(since, now, "UTC"))).toEqual([
      "today",
      "yesterday",
      "2 days ago",
    ]);
    expect(bagAge("out", at(26), now, "UTC")).toBe("left there 2 days ago");
  });
});

describe("addresses", () => {
  it("are those of the contracts", () => {
    const pairs = [
      [addresses.POINTS, listPointsEndpoint],
      [addresses.SCALES, listScalesEndpoint],
      [addresses.CONTAINERS, listContainersEndpoint],
      [addresses.COLOURS, listColoursEndpoint],
      [addresses.SPARE_TAG, giveSpareTagEndpoint],
    ] as const;
    for (const [address, { method, path }] of pairs) expect(address).toEqual({ method, path });
  });
});
