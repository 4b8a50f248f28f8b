/** Which engine reads: the best one that shows here and now that it can. */
import { CANARY_TEXT, canaryPicture } from "./canary";
import { CameraError, type ScanEngine } from "./scan-engine";

type Maker = { name: ScanEngine["name"]; make: () => Promise<ScanEngine> };

/**
 * Best first. The WebAssembly engine comes before the browser's own: its read rates are measured on every
 * picture of the corpus and it is the same on every phone, while BarcodeDetector is another program on each
 * system, absent on most, and could not be measured here at all. It still stands before html5-qrcode, whose
 * rates are measured and much lower, for a phone that runs no WebAssembly.
 */
const MAKERS: readonly Maker[] = [
  { name: "wasm", make: async () => (await import("./engines/wasm")).wasmEngine() },
  { name: "native", make: async () => (await import("./engines/native")).nativeEngine() },
  {
    name: "html5-qrcode",
    make: async () => (await import("./engines/html5-qrcode")).html5QrcodeEngine(),
  },
];

/** 460 KB at 1.6 Mbit/s take under 3 s; who waits longer is better served by what the browser has. */
const FETCH_MS = 12_000;
/** For the test picture, which is easy: a slow phone needs a tenth of it. */
const CANARY_MS = 3000;

/**
 * The first engine that reads the test picture within its time, whatever the browser claims to have.
 *
 * @param broken engines that failed before
 * @throws CameraError "unread" when none does
 */
export async function chooseEngine(
  broken: ReadonlySet<ScanEngine["name"]>,
  makers: readonly Maker[] = MAKERS,
  picture: () => HTMLCanvasElement = canaryPicture,
): Promise<ScanEngine> {
  const refusals: unknown[] = [];
  for (const { name, make } of makers) {
    if (broken.has(name)) continue;
    const making = make();
    try {
      const engine = await within(FETCH_MS, making);
      const text = await within(CANARY_MS, engine.decode(picture(), "live"));
      if (text === CANARY_TEXT) return engine;
      throw new Error(`${name} read ${text === null ? "nothing" : "another text"}`);
    } catch (error) {
      refusals.push(error);
      // Also one that arrives too late holds a worker.
      making.then((engine) => engine.close()).catch(() => undefined);
    }
  }
  throw new CameraError("unread", new AggregateError(refusals));
}

function within<T>(ms: number, work: Promise<T>): Promise<T> {
  return new Promise<T>((resolve, reject) => {
    const timer = setTimeout(() => reject(new Error(`not within ${ms} ms`)), ms);
    work.then(resolve, reject).finally(() => clearTimeout(timer));
  });
}
