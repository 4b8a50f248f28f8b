/** The corpus as files: drawn once for these sources, kept in .cache and never committed. */
import { createHash } from "node:crypto";
import fs from "node:fs";
import path from "node:path";
import sharp from "sharp";
import type { GreyImage } from "@/tests/support/scan-sheets";
import { draw, pictures, SEED, type Picture } from "./pictures";
import { SEVERITIES } from "./severities";

const ROOT = path.resolve(import.meta.dirname, "../../..");
/** What a picture depends on. */
const SOURCES = [
  ...["glyphs", "pictures", "random", "severities", "spoil", "tag-face", "view"].map(
    (name) => `tests/bench/scan-corpus/${name}.ts`,
  ),
  "lib/bags/rules/qr.ts",
  "lib/bags/rules/tag-sheet.ts",
];

export type Filed = Picture & { file: string };

function stamp(): string {
  const hash = createHash("sha256").update(SEED);
  for (const name of SOURCES) hash.update(fs.readFileSync(path.join(ROOT, name)));
  return hash.digest("hex").slice(0, 16);
}

/** Pixels as a file; of kind jpeg with its quality, all others without loss. */
export async function encoded(picture: Picture, image: GreyImage): Promise<Buffer> {
  const raw = { width: image.width, height: image.height, channels: 1 as const };
  const made = sharp(image.pixels, { raw });
  return picture.kind === "jpeg"
    ? made.jpeg({ quality: SEVERITIES.jpeg[picture.severity] }).toBuffer()
    : made.png({ compressionLevel: 3 }).toBuffer();
}

/** Draws what is not there yet. */
export async function makeCorpus(): Promise<Filed[]> {
  const parent = path.join(ROOT, ".cache/scan-corpus");
  const folder = path.join(parent, stamp());
  if (!fs.existsSync(folder)) {
    fs.rmSync(parent, { recursive: true, force: true });
    fs.mkdirSync(folder, { recursive: true });
  }
  const filed: Filed[] = [];
  for (const picture of pictures()) {
    const file = path.join(folder, `${picture.name}.${picture.kind === "jpeg" ? "jpg" : "png"}`);
    if (!fs.existsSync(file)) {
      fs.writeFileSync(`${file}.part`, await encoded(picture, draw(picture)));
      fs.renameSync(`${file}.part`, file);
    }
    filed.push({ ...picture, file });
  }
  return filed;
}
