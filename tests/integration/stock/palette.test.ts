import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { newId } from "@/lib/core/ids";
import { inTransaction } from "@/lib/platform/database";
import {
  addColour,
  changeColour,
  orderColours,
  restoreColour,
  retireColour,
  setUpPaletteIn,
} from "@/lib/stock/commands/palette";
import { getColour, listColours } from "@/lib/stock/queries/palette";
import { FIRST_PALETTE } from "@/lib/stock/terms";
import { commandCases, refusalOf } from "@/tests/support/command-cases";
import { newScheme, NOON, type TestScheme } from "@/tests/support/scheme";

const CODES = FIRST_PALETTE.map((colour) => colour.code);

function setUp(scheme: TestScheme): void {
  inTransaction(scheme, (tx) => setUpPaletteIn(tx));
}

function codesOf(scheme: TestScheme): string[] {
  return listColours(scheme.ctx("volunteer")).items.map((colour) => colour.code);
}

describe("addColour", () => {
  commandCases({
    command: addColour,
    by: "coordinator",
    notBy: "lead",
    input: (scheme) => {
      setUp(scheme);
      return { requestId: newId(), name: "Sea  green", hex: "#2f8f83", look: "solid" as const };
    },
    does: (scheme, answer) => {
      expect(answer).toEqual({
        code: "sea-green",
        name: "Sea green",
        hex: "#2f8f83",
        look: "solid",
        position: FIRST_PALETTE.length + 1,
        retiredAt: null,
      });
      expect(codesOf(scheme)).toEqual([...CODES, "sea-green"]);
    },
    wrongState: (scheme) => {
      setUp(scheme);
      return {
        input: { requestId: newId(), name: "light BLUE", hex: "#8fb8e8", look: "solid" as const },
        code: "name-in-use",
      };
    },
    action: "palette.add",
  });
});

describe("changeColour", () => {
  commandCases({
    command: changeColour,
    by: "coordinator",
    notBy: "volunteer",
    input: (scheme) => {
      setUp(scheme);
      return {
        requestId: newId(),
        code: "blue",
        name: "Dark blue",
        hex: "#12309a",
        look: "solid" as const,
      };
    },
    does: (scheme, answer) => {
      expect(answer).toMatchObject({ code: "blue", name: "Dark blue", hex: "#12309a" });
      expect(getColour(scheme.db.reader, "blue")).toEqual(answer);
    },
    wrongState: (scheme) => {
      setUp(scheme);
      return {
        input: {
          requestId: newId(),
          code: "blue",
          name: "Green",
          hex: "#12309a",
          look: "solid" as const,
        },
        code: "name-in-use",
      };
    },
    action: "palette.change",
  });
});

describe("orderColours", () => {
  commandCases({
    command: orderColours,
    by: "coordinator",
    notBy: "lead",
    input: (scheme) => {
      setUp(scheme);
      return { requestId: newId(), codes: [...CODES].reverse() };
    },
    does: (scheme) => expect(codesOf(scheme)).toEqual([...CODES].reverse()),
    wrongState: (scheme) => {
      setUp(scheme);
      return { input: { requestId: newId(), codes: CODES.slice(1) }, code: "colour-order" };
    },
    action: "palette.order",
  });
});

describe("retireColour", () => {
  commandCases({
    command: retireColour,
    by: "coordinator",
    notBy: "lead",
    input: (scheme) => {
      setUp(scheme);
      return { requestId: newId(), code: "pink" };
    },
    does: (scheme, answer) => {
      expect(answer.retiredAt).toBe(NOON);
      expect(codesOf(scheme).at(-1)).toBe("pink");
    },
    wrongState: () => ({ input: { requestId: newId(), code: "pink" }, code: "not-found" }),
    action: "palette.retire",
  });
});

describe("restoreColour", () => {
  commandCases({
    command: restoreColour,
    by: "coordinator",
    notBy: "lead",
    input: (scheme) => {
      setUp(scheme);
      const retire = { requestId: newId(), code: "white" };
      retireColour(scheme.ctx("coordinator", NOON, retire), retire);
      return { requestId: newId(), code: "white" };
    },
    does: (scheme, answer) => {
      expect(answer.retiredAt).toBeNull();
      expect(codesOf(scheme).at(-1)).toBe("white");
    },
    wrongState: () => ({ input: { requestId: newId(), code: "no-such" }, code: "not-found" }),
    action: "palette.restore",
  });
});

describe("palette", () => {
  let scheme: TestScheme;
  beforeEach(() => {
    scheme = newScheme();
    setUp(scheme);
  });
  afterEach(() => scheme.close());

  it("starts with the first palette, and a second set-up changes nothing that a coordinator changed", () => {
    const input = {
      requestId: newId(),
      code: "blue",
      name: "Navy",
      hex: "#0a1a5c",
      look: "solid" as const,
    };
    changeColour(scheme.ctx("coordinator", NOON, input), input);
    setUp(scheme);
    expect(codesOf(scheme)).toEqual(CODES);
    expect(getColour(scheme.db.reader, "blue")?.name).toBe("Navy");
  });

  it("keeps the code when the name changes, and makes no code twice", () => {
    const rename = {
      requestId: newId(),
      code: "blue",
      name: "Navy",
      hex: "#0a1a5c",
      look: "solid" as const,
    };
    changeColour(scheme.ctx("coordinator", NOON, rename), rename);
    const add = { requestId: newId(), name: "Blue", hex: "#1f46d6", look: "solid" as const };
    expect(addColour(scheme.ctx("coordinator", NOON, add), add).code).toBe("blue-2");
  });

  it("refuses an order that names a retired or a doubled colour", () => {
    const retire = { requestId: newId(), code: "pink" };
    retireColour(scheme.ctx("coordinator", NOON, retire), retire);
    const order = (codes: string[]) => {
      const input = { requestId: newId(), codes };
      return orderColours(scheme.ctx("coordinator", NOON, input), input);
    };
    const open = CODES.filter((code) => code !== "pink");
    expect(refusalOf(() => order(CODES))).toBe("colour-order");
    expect(refusalOf(() => order([...open.slice(1), "blue"]))).toBe("colour-order");
    expect(order(open)).toEqual({ codes: open });
  });

  it("is for the shed only", () => {
    expect(refusalOf(() => listColours(scheme.ctx("donor")))).toBe("forbidden");
  });
});
