import QRCode from "qrcode";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { CANARY_ROWS, CANARY_TEXT } from "@/components/scanner/canary";
import { chooseEngine } from "@/components/scanner/choose-engine";
import type { ScanEngine } from "@/components/scanner/scan-engine";

beforeEach(() => vi.useFakeTimers());
afterEach(() => vi.useRealTimers());

const picture = (): HTMLCanvasElement => ({}) as HTMLCanvasElement;
const never = <T>(): Promise<T> => new Promise<T>(() => undefined);

function maker(name: ScanEngine["name"], decode: () => Promise<string | null>, closed: string[]) {
  const engine: ScanEngine = { name, decode, close: () => closed.push(name) };
  return { name, make: () => Promise.resolve(engine) };
}

describe("choosing an engine", () => {
  it("takes the first that reads the test picture, whatever the others claim", async () => {
    const closed: string[] = [];
    const chosen = chooseEngine(
      new Set(),
      [
        { name: "wasm", make: () => Promise.reject(new Error("no WebAssembly")) },
        maker("native", () => Promise.resolve(null), closed),
        maker("html5-qrcode", () => Promise.resolve(CANARY_TEXT), closed),
      ],
      picture,
    );
    expect((await chosen).name).toBe("html5-qrcode");
    expect(closed).toEqual(["native"]);
  });

  it("does not take one that reads it wrong, throws, or is silent", async () => {
    const closed: string[] = [];
    const chosen = chooseEngine(
      new Set(),
      [
        maker("wasm", () => Promise.resolve("BISMAR TEXT"), closed),
        maker("native", () => never(), closed),
        maker("html5-qrcode", () => Promise.reject(new Error("died")), closed),
      ],
      picture,
    );
    const refused = expect(chosen).rejects.toMatchObject({ trouble: "unread" });
    await vi.advanceTimersByTimeAsync(30_000);
    await refused;
    expect(closed.sort()).toEqual(["html5-qrcode", "native", "wasm"]);
  });

  it("does not wait for ever for one that does not arrive, and closes it when it does", async () => {
    const closed: string[] = [];
    let arrive: (engine: ScanEngine) => void = () => undefined;
    const late = new Promise<ScanEngine>((resolve) => {
      arrive = resolve;
    });
    const chosen = chooseEngine(
      new Set(),
      [
        { name: "wasm", make: () => late },
        maker("native", () => Promise.resolve(CANARY_TEXT), closed),
      ],
      picture,
    );
    await vi.advanceTimersByTimeAsync(20_000);
    expect((await chosen).name).toBe("native");
    arrive({ name: "wasm", decode: () => never(), close: () => closed.push("late wasm") });
    await vi.advanceTimersByTimeAsync(1);
    expect(closed).toEqual(["late wasm"]);
  });

  it("passes over one that broke before", async () => {
    const works = () => Promise.resolve(CANARY_TEXT);
    const makers = [maker("wasm", works, []), maker("native", works, [])];
    expect((await chooseEngine(new Set(["wasm"]), makers, picture)).name).toBe("native");
  });
});

it("has a test picture that says what it should", () => {
  const { modules } = QRCode.create([{ data: CANARY_TEXT, mode: "alphanumeric" }], {
    errorCorrectionLevel: "Q",
  });
  const rows = Array.from({ length: modules.size }, (_, row) =>
    Array.from({ length: modules.size }, (__, column) => modules.data[row * modules.size + column])
      .map((dark) => (dark ? "1" : "0"))
      .join(""),
  );
  expect(CANARY_ROWS.map((bits) => bits.toString(2).padStart(modules.size, "0"))).toEqual(rows);
});
