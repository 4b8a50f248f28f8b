/** A few pictures of the corpus in CI: the whole table is `npm run bench scan-corpus`. */
import fs from "node:fs";
import { beforeAll, describe, expect, it } from "vitest";
import sharp from "sharp";
import { startDecoder } from "@/components/scanner/worker/decoder";
import type { Grey } from "@/components/scanner/worker/grey";
import { passReader } from "@/components/scanner/worker/read-passes";
import { encoded } from "@/tests/bench/scan-corpus/make-corpus";
import { draw, pictures, type Picture } from "@/tests/bench/scan-corpus/pictures";

const WASM = "node_modules/zxing-wasm/dist/reader/zxing_reader.wasm";

/** The middle severity's first of every kind, one without a tag, one of somebody else. */
const CHOSEN = pictures().filter(({ name }) => /(-2-01|^no-tag-01|^foreign-qr-02)$/.test(name));

let read: (grey: Grey, effort: "live" | "photo") => string | null;
beforeAll(async () => {
  const wasm = Uint8Array.from(fs.readFileSync(WASM));
  read = passReader(await startDecoder(wasm.buffer), () => performance.now());
});

async function greyOf(picture: Picture): Promise<Grey> {
  // Through its file format: jpeg's damage is the encoder's.
  const { data, info } = await sharp(await encoded(picture, draw(picture)))
    .greyscale()
    .raw()
    .toBuffer({ resolveWithObject: true });
  return { width: info.width, height: info.height, data: new Uint8Array(data) };
}

describe("the scanner on pictures of the corpus", () => {
  it("has the kinds it should", () => {
    expect(CHOSEN).toHaveLength(14);
    expect(pictures().length).toBeGreaterThanOrEqual(400);
    expect(new Set(pictures().map(({ name }) => name)).size).toBe(pictures().length);
  });

  it("reads nearly all as photos, and nothing that is not there", async () => {
    const wrong: string[] = [];
    let right = 0;
    for (const picture of CHOSEN) {
      const text = read(await greyOf(picture), "photo");
      if (text !== null && text !== picture.text) wrong.push(`${picture.name}: ${text}`);
      if (text !== null && text === picture.text) right += 1;
    }
    expect(wrong).toEqual([]);
    expect(right).toBeGreaterThanOrEqual(12);
  });

  it("reads a blurred tag that is held still, within the passes of twenty live frames", async () => {
    const blurred = CHOSEN.find(({ kind }) => kind === "blur");
    if (!blurred) throw new Error("no blurred picture");
    const grey = await greyOf(blurred);
    const texts = Array.from({ length: 20 }, () => read(grey, "live"));
    expect(texts).toContain(blurred.text);
  });

  it("gives the same pixels for the same seed", () => {
    const [first] = CHOSEN;
    if (!first) throw new Error("no picture");
    expect(draw(first).pixels.equals(draw(first).pixels)).toBe(true);
  });
});
