import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import type { OpenCamera } from "@/components/scanner/camera";
import { CameraError, cameraTrouble, type ScanEngine } from "@/components/scanner/scan-engine";
import { Scanner, type ScannerParts } from "@/components/scanner/scanner";

/** Stands in for the browser: counts how often its camera is held at once, and shows what it is given. */
function browser(over: Partial<ScannerParts> = {}) {
  const seen = {
    opened: [] as (string | null)[],
    held: 0,
    mostHeld: 0,
    told: [] as string[],
    remembered: [] as string[],
    sounds: [] as string[],
    lose: (): void => undefined,
    /** Holds a picture in front of the camera. */
    show: (_: string): Promise<void> => Promise.resolve(),
    shown: null as string | null,
    ended: 0,
    closed: [] as string[],
  };
  const engine = (name: ScanEngine["name"], fails = false): ScanEngine => ({
    name,
    decode: () => (fails ? Promise.reject(new Error("died")) : Promise.resolve(seen.shown)),
    close: () => seen.closed.push(name),
  });
  const parts: ScannerParts = {
    async openCamera(_element, deviceId) {
      seen.opened.push(deviceId);
      await new Promise((resolve) => setTimeout(resolve, 5));
      seen.held += 1;
      seen.mostHeld = Math.max(seen.mostHeld, seen.held);
      let lit: boolean | null = false;
      const camera: OpenCamera = {
        video: {} as HTMLVideoElement,
        deviceId: deviceId ?? "rear",
        get lamp() {
          return lit;
        },
        setLamp: (on) => {
          lit = on;
          return Promise.resolve();
        },
        onLost: (lost) => {
          seen.lose = lost;
        },
        close: () => {
          seen.held -= 1;
        },
      };
      return camera;
    },
    listCameras: () => Promise.resolve(["rear", "front"]),
    rememberCamera: (id) => seen.remembered.push(id),
    chooseEngine: () => Promise.resolve(engine("wasm")),
    startFrames: (_video, read) => {
      seen.show = (text) => {
        seen.shown = text;
        return read({} as HTMLCanvasElement);
      };
      return () => {
        seen.ended += 1;
      };
    },
    giveFeedback: (verdict) => seen.sounds.push(verdict),
    endFeedback: () => undefined,
    ...over,
  };
  const scanner = new Scanner(parts);
  scanner.listen((text) => seen.told.push(text));
  return { seen, scanner, engine };
}
const element = (): HTMLElement => ({}) as HTMLElement;
const settled = () => vi.advanceTimersByTimeAsync(100);

beforeEach(() => vi.useFakeTimers());
afterEach(() => vi.useRealTimers());

describe("the scanner and its camera", () => {
  it("holds one camera when it is mounted, unmounted and mounted again at once", async () => {
    const { seen, scanner } = browser();
    const place = element();
    scanner.show(place);
    scanner.hide();
    scanner.show(place);
    await settled();
    expect(seen).toMatchObject({ opened: [null], held: 1, mostHeld: 1 });
    expect(scanner.current()).toMatchObject({ kind: "on", engine: "wasm", cameras: 2 });
  });

  it("moves to another element by letting the camera go first", async () => {
    const { seen, scanner } = browser();
    scanner.show(element());
    await settled();
    scanner.show(element());
    await settled();
    expect(seen).toMatchObject({ held: 1, mostHeld: 1 });
    expect(seen.opened).toHaveLength(2);
  });

  it("lets the camera go on leaving, also while it is still starting", async () => {
    const { seen, scanner } = browser();
    scanner.show(element());
    scanner.hide();
    await settled();
    expect(seen.held).toBe(0);
    expect(scanner.current()).toEqual({ kind: "off" });
    scanner.show(element());
    await settled();
    scanner.hide();
    await settled();
    expect(seen).toMatchObject({ held: 0, ended: 2 });
  });

  it("lets it go while the page is hidden and takes it again afterwards", async () => {
    const { seen, scanner } = browser();
    scanner.show(element());
    await settled();
    scanner.pageHidden(true);
    await settled();
    expect(seen.held).toBe(0);
    scanner.pageHidden(false);
    await settled();
    expect(seen.held).toBe(1);
  });

  it("takes a camera back that the system took away, and gives up when that goes on", async () => {
    const { seen, scanner } = browser();
    scanner.show(element());
    await settled();
    for (let loss = 0; loss < 3; loss += 1) {
      seen.lose();
      await settled();
      expect(seen).toMatchObject({ held: 1, mostHeld: 1 });
    }
    expect(seen.opened).toHaveLength(4);
    seen.lose();
    await settled();
    expect(seen.held).toBe(0);
    expect(scanner.current()).toEqual({ kind: "trouble", trouble: "busy" });
  });

  it("restarts a camera lost now and then, hours apart", async () => {
    const { seen, scanner } = browser();
    scanner.show(element());
    await settled();
    for (let loss = 0; loss < 10; loss += 1) {
      seen.lose();
      await vi.advanceTimersByTimeAsync(3_600_000);
    }
    expect(seen.held).toBe(1);
    expect(seen.opened).toHaveLength(11);
  });

  it("says why there is no picture, and can be asked again", async () => {
    const asked: number[] = [];
    const { scanner } = browser({
      openCamera: () => {
        asked.push(1);
        return Promise.reject(new CameraError("refused"));
      },
    });
    scanner.show(element());
    await settled();
    expect(scanner.current()).toEqual({ kind: "trouble", trouble: "refused" });
    expect(asked).toHaveLength(1);
    scanner.show(element());
    await settled();
    expect(asked).toHaveLength(2);
  });

  it("changes to the other camera and remembers it", async () => {
    const { seen, scanner } = browser();
    scanner.show(element());
    await settled();
    await scanner.nextCamera();
    await settled();
    expect(seen).toMatchObject({ opened: [null, "front"], remembered: ["front"], held: 1 });
    await scanner.nextCamera();
    await settled();
    expect(seen.opened).toEqual([null, "front", "rear"]);
    expect(seen.mostHeld).toBe(1);
  });

  it("switches the lamp", async () => {
    const { scanner } = browser();
    scanner.show(element());
    await settled();
    expect(scanner.current()).toMatchObject({ lamp: false });
    await scanner.setLamp(true);
    expect(scanner.current()).toMatchObject({ lamp: true });
  });
});

describe("the scanner and what it reads", () => {
  it("tells a tag once, until another was read or it was forgotten", async () => {
    const { seen, scanner } = browser();
    scanner.show(element());
    await settled();
    for (const text of ["A", "A", "A", "B", "B", "A"]) await seen.show(text);
    expect(seen.told).toEqual(["A", "B", "A"]);
    scanner.forget();
    await seen.show("A");
    expect(seen.told).toEqual(["A", "B", "A", "A"]);
  });

  it("does not tell what was read after the camera was let go", async () => {
    const { seen, scanner } = browser();
    scanner.show(element());
    await settled();
    const reading = seen.show("A");
    scanner.hide();
    await reading;
    expect(seen.told).toEqual([]);
  });

  it("marks and sounds what the screen found out, for a moment", async () => {
    const { seen, scanner } = browser();
    scanner.show(element());
    await settled();
    scanner.settle("unknown");
    expect(scanner.current()).toMatchObject({ mark: "unknown" });
    expect(seen.sounds).toEqual(["unknown"]);
    await vi.advanceTimersByTimeAsync(2000);
    expect(scanner.current()).toMatchObject({ kind: "on", mark: null });
  });

  it("goes on with the next engine when one dies", async () => {
    const asked: string[][] = [];
    const made = browser({
      chooseEngine: (broken) => {
        asked.push([...broken]);
        return Promise.resolve(
          broken.has("wasm") ? made.engine("html5-qrcode") : made.engine("wasm", true),
        );
      },
    });
    const { seen, scanner } = made;
    scanner.show(element());
    await settled();
    await seen.show("A");
    expect(seen.told).toEqual(["A"]);
    expect(asked).toEqual([[], ["wasm"]]);
    expect(seen.closed).toEqual(["wasm"]);
  });

  it("gives the camera back when nothing can read, and tries all again the next time", async () => {
    let works = false;
    const made = browser({
      chooseEngine: () =>
        works ? Promise.resolve(made.engine("wasm")) : Promise.reject(new CameraError("unread")),
    });
    const { seen, scanner } = made;
    scanner.show(element());
    await settled();
    expect(scanner.current()).toEqual({ kind: "trouble", trouble: "unread" });
    expect(seen.held).toBe(0);
    works = true;
    scanner.show(element());
    await settled();
    expect(scanner.current()).toMatchObject({ kind: "on", engine: "wasm" });
  });

  it("gives the engine's memory back when nobody has scanned for a while", async () => {
    const { seen, scanner } = browser();
    scanner.show(element());
    await settled();
    scanner.hide();
    await vi.advanceTimersByTimeAsync(70_000);
    expect(seen.closed).toEqual(["wasm"]);
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
