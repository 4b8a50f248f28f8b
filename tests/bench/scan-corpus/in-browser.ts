/** What the bench runs in Chromium: the production engine and worker, html5-qrcode alone, and the clock. */
import { Html5Qrcode, Html5QrcodeSupportedFormats } from "html5-qrcode";
import { wasmEngine } from "@/components/scanner/engines/wasm";
import { canvasOf, drawScaled } from "@/components/scanner/frame-loop";
import { readPhoto } from "@/components/scanner/read-photo";
import type { ScanEngine } from "@/components/scanner/scan-engine";
import { startDecoder } from "@/components/scanner/worker/decoder";
import { greyOf } from "@/components/scanner/worker/grey";
import { passReader } from "@/components/scanner/worker/read-passes";

/** As many frames as a tag held still for two seconds gives. */
const LIVE_FRAMES = 18;
const FRAME_PX = 960;

let engine: Promise<ScanEngine> | null = null;
const ours = (): Promise<ScanEngine> => (engine ??= wasmEngine());

async function fileOf(address: string): Promise<File> {
  const blob = await (await fetch(address)).blob();
  return new File([blob], address, { type: blob.type });
}

/** The picture as the camera's frame would be, on a canvas. */
async function frameOf(address: string): Promise<HTMLCanvasElement> {
  const picture = await createImageBitmap(await fileOf(address));
  const canvas = canvasOf(1, 1);
  drawScaled(canvas, picture, picture, FRAME_PX);
  picture.close();
  return canvas;
}

async function html5(address: string): Promise<string | null> {
  const host = document.createElement("div");
  host.id = "host";
  document.body.replaceChildren(host);
  const reader = new Html5Qrcode("host", {
    verbose: false,
    formatsToSupport: [Html5QrcodeSupportedFormats.QR_CODE],
  });
  try {
    return (await reader.scanFileV2(await fileOf(address), false)).decodedText;
  } catch {
    // Its way of saying that there is no symbol.
    return null;
  } finally {
    reader.clear();
  }
}

export type Reads = { photo: string | null; live: string | null; html5: string | null };

async function readAll(address: string): Promise<Reads> {
  const { decode } = await ours();
  const photo = await readPhoto(await fileOf(address), decode);
  const frame = await frameOf(address);
  let live: string | null = null;
  for (let at = 0; at < LIVE_FRAMES && live === null; at += 1) live = await decode(frame, "live");
  return { photo, live, html5: await html5(address) };
}

/**
 * Milliseconds of single live frames, in this thread: DevTools slows a page's thread and not its workers, so the
 * worker's code is run here.
 */
async function timeFrames(addresses: readonly string[], framesEach: number): Promise<number[]> {
  const wasm = await (await fetch("/scanner/zxing_reader.wasm")).arrayBuffer();
  const read = passReader(await startDecoder(wasm), () => performance.now());
  const times: number[] = [];
  for (const address of addresses) {
    const frame = await frameOf(address);
    const context = frame.getContext("2d", { willReadFrequently: true });
    if (!context) throw new Error("no canvas");
    for (let at = 0; at < framesEach; at += 1) {
      const started = performance.now();
      const { data } = context.getImageData(0, 0, frame.width, frame.height);
      read(greyOf(data, frame.width, frame.height), "live");
      times.push(performance.now() - started);
    }
  }
  return times;
}

export type InBrowser = { readAll: typeof readAll; timeFrames: typeof timeFrames };
Object.assign(globalThis, { scanBench: { readAll, timeFrames } satisfies InBrowser });
