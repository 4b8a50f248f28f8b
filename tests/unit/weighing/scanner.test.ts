import { describe, expect, it } from "vitest";
import { Scanner } from "@/components/weighing/scanner/scanner";
import {
  CameraError,
  cameraTrouble,
  type ScanEngine,
} from "@/components/weighing/scanner/scan-engine";

/** Stands in for the browser's camera: counts how often it is held at once. */
function camera(refuse = false) {
  const seen = { starts: 0, stops: 0, held: 0, mostHeld: 0, read: (_: string): void => undefined };
  const engine: ScanEngine = {
    async start(_element, onRead) {
      seen.starts += 1;
      await new Promise((resolve) => setTimeout(resolve, 5));
      if (refuse) throw new CameraError("refused");
      seen.held += 1;
      seen.mostHeld = Math.max(seen.mostHeld, seen.held);
      seen.read = onRead;
    },
    async stop() {
      seen.stops += 1;
      await new Promise((resolve) => setTimeout(resolve, 5));
      seen.held -= 1;
    },
  };
  return { seen, engine };
}
const element = (): HTMLElement => ({}) as HTMLElement;
const settled = () => new Promise((resolve) => setTimeout(resolve, 60));

describe("the scanner", () => {
  it("holds one camera when it is mounted, unmounted and mounted again at once", async () => {
    const { seen, engine } = camera();
    const scanner = new Scanner(engine);
    const place = element();
    scanner.show(place);
    scanner.hide();
    scanner.show(place);
    await settled();
    expect(seen).toMatchObject({ starts: 1, stops: 0, held: 1 });
    expect(scanner.current()).toEqual({ kind: "on" });
  });

  it("moves to another element by letting the camera go first", async () => {
    const { seen, engine } = camera();
    const scanner = new Scanner(engine);
    scanner.show(element());
    await settled();
    scanner.show(element());
    await settled();
    expect(seen).toMatchObject({ starts: 2, stops: 1, held: 1, mostHeld: 1 });
  });

  it("lets the camera go on leaving, also while it is still starting", async () => {
    const { seen, engine } = camera();
    const scanner = new Scanner(engine);
    scanner.show(element());
    scanner.hide();
    await settled();
    expect(seen.held).toBe(0);
    expect(scanner.current()).toEqual({ kind: "off" });
  });

  it("lets it go while the page is hidden and takes it again afterwards", async () => {
    const { seen, engine } = camera();
    const scanner = new Scanner(engine);
    scanner.show(element());
    await settled();
    scanner.pageHidden(true);
    await settled();
    expect(seen.held).toBe(0);
    scanner.pageHidden(false);
    await settled();
    expect(seen.held).toBe(1);
  });

  it("tells a tag once, until another was read or it was forgotten", async () => {
    const { seen, engine } = camera();
    const scanner = new Scanner(engine);
    const told: string[] = [];
    scanner.listen((text) => told.push(text));
    scanner.show(element());
    await settled();
    for (const text of ["A", "A", "A", "B", "B", "A"]) seen.read(text);
    expect(told).toEqual(["A", "B", "A"]);
    scanner.forget();
    seen.read("A");
    expect(told).toEqual(["A", "B", "A", "A"]);
  });

  it("says why there is no picture, and can be asked again", async () => {
    const { seen, engine } = camera(true);
    const scanner = new Scanner(engine);
    scanner.show(element());
    await settled();
    expect(scanner.current()).toEqual({ kind: "trouble", trouble: "refused" });
    expect(seen.starts).toBe(1);
    scanner.show(element());
    await settled();
    expect(seen.starts).toBe(2);
  });
});

describe("cameraTrouble", () => {
  it.each([
    ["NotAllowedError : Permission denied", "refused"],
    ["Error getting userMedia, error = NotAllowedError: Permission denied", "refused"],
    ["NotFoundError: Requested device not found", "absent"],
    ["NotReadableError: Could not start video source", "busy"],
    ["something else", "failed"],
  ])("reads %s", (text, trouble) => expect(cameraTrouble(text)).toBe(trouble));
});
