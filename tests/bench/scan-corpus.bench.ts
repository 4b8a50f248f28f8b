/**
 * What the scanner reads of 480 pictures of tags, by kind and severity of damage, beside html5-qrcode alone and
 * zbarimg on the same pictures; and how long a frame takes on a processor slowed four times. Ours is the engine
 * and the worker that are shipped, in Chromium, under the worker's own policy.
 */
import path from "node:path";
import { chromium, type Page } from "@playwright/test";
import { installedBrowser } from "@/tests/support/browser.mjs";
import type { BenchRow } from "./bench-row";
import type { InBrowser, Reads } from "./scan-corpus/in-browser";
import { makeCorpus, type Filed } from "./scan-corpus/make-corpus";
import { serveBench } from "./scan-corpus/serve";
import { KINDS, SEVERITY_NAMES } from "./scan-corpus/severities";
import { readByZbar } from "./scan-corpus/zbar";

export const name = "scan-corpus";
export const soak = false;

const SLOWDOWN = 4;
/** Every so many-th picture is timed, each as so many frames. */
const TIMED_STEP = 5;
const FRAMES_EACH = 4;

type Scores = Reads & { zbar: string | null };
type Reader = keyof Scores;
const READERS: readonly Reader[] = ["photo", "live", "html5", "zbar"];
const HEADS: Record<Reader, string> = {
  photo: "ours, photo",
  live: "ours, live",
  html5: "html5-qrcode",
  zbar: "zbarimg",
};

const share = (values: readonly number[], part: number): number =>
  [...values].sort((a, b) => a - b)[
    Math.min(values.length - 1, Math.floor(values.length * part))
  ] ?? 0;

const timed = (page: Page, addresses: string[]): Promise<number[]> =>
  page.evaluate(
    ([list, each]) =>
      (globalThis as unknown as { scanBench: InBrowser }).scanBench.timeFrames(list, each),
    [addresses, FRAMES_EACH] as const,
  );

type Line = { name: string; of: number; right: Record<Reader, number> };

function tell(lines: readonly Line[], hasZbar: boolean): void {
  console.log(
    `  ${"pictures".padEnd(24)}${"of".padStart(4)}${READERS.map((r) => HEADS[r].padStart(14)).join("")}`,
  );
  for (const { name: row, of, right } of lines) {
    const cells = READERS.map((r) =>
      (r === "zbar" && !hasZbar ? "absent" : String(right[r])).padStart(14),
    );
    console.log(`  ${row.padEnd(24)}${String(of).padStart(4)}${cells.join("")}`);
  }
}

export async function run(): Promise<BenchRow[]> {
  const corpus = await makeCorpus();
  const zbar = readByZbar(corpus.map(({ file }) => file));
  const bench = await serveBench(path.dirname(corpus[0]?.file ?? ""));
  const browser = await chromium.launch({
    executablePath: installedBrowser() ?? undefined,
    args: ["--no-sandbox"],
  });
  try {
    const page = await browser.newPage();
    await page.goto(bench.url);
    const scores = new Map<Filed, Scores>();
    for (const picture of corpus) {
      const reads = await page.evaluate(
        (address) => (globalThis as unknown as { scanBench: InBrowser }).scanBench.readAll(address),
        `/picture/${path.basename(picture.file)}`,
      );
      scores.set(picture, { ...reads, zbar: zbar?.get(picture.file) ?? null });
    }

    const addresses = corpus
      .filter((_, at) => at % TIMED_STEP === 0)
      .map(({ file }) => `/picture/${path.basename(file)}`);
    // The first round is for the compilers.
    await timed(page, addresses.slice(0, 10));
    const plain = await timed(page, addresses);
    const cdp = await page.context().newCDPSession(page);
    await cdp.send("Emulation.setCPUThrottlingRate", { rate: SLOWDOWN });
    const slowed = await timed(page, addresses);

    const line = (row: string, of: (picture: Filed) => boolean): Line => {
      const chosen = corpus.filter(of);
      const right = (reader: Reader) =>
        chosen.filter((p) => p.text !== null && scores.get(p)?.[reader] === p.text).length;
      return {
        name: row,
        of: chosen.length,
        right: {
          photo: right("photo"),
          live: right("live"),
          html5: right("html5"),
          zbar: right("zbar"),
        },
      };
    };
    const damaged = KINDS.flatMap((kind) =>
      ([0, 1, 2] as const).map((severity) =>
        line(
          `${kind}, ${SEVERITY_NAMES[severity]}`,
          (p) => p.kind === kind && p.severity === severity,
        ),
      ),
    );
    const all = line("all of them", (p) => p.kind !== "no tag" && p.kind !== "foreign QR");
    tell([...damaged, all, line("foreign QR", (p) => p.kind === "foreign QR")], zbar !== null);
    const wrong = (reader: Reader) =>
      corpus.filter((p) => {
        const text = scores.get(p)?.[reader] ?? null;
        return text !== null && text !== p.text;
      }).length;
    console.log(
      `  wrong texts, pictures without a tag among them: ${READERS.map((r) => `${HEADS[r]} ${wrong(r)}`).join(", ")}`,
    );
    const behind = (reader: "photo" | "live") =>
      damaged.filter(({ right }) => right[reader] < Math.max(right.html5, right.zbar));
    for (const { name: row } of behind("photo")) console.log(`  behind: ${row}`);
    const better = {
      name: "the better of the two",
      value: Math.max(all.right.html5, all.right.zbar),
    };
    return [
      {
        figure: "tags read from a photo",
        value: all.right.photo,
        unit: "tags",
        yardstick: better,
        least: 1,
      },
      {
        figure: "tags read live, held still for 2 s",
        value: all.right.live,
        unit: "tags",
        yardstick: better,
        least: 1,
      },
      {
        figure: `of ${damaged.length} rows, behind the better of the two, photo`,
        value: behind("photo").length,
        unit: "rows",
        most: 0,
      },
      {
        figure: `of ${damaged.length} rows, behind the better of the two, live`,
        value: behind("live").length,
        unit: "rows",
        most: 0,
      },
      {
        figure: "false reads, photo and live",
        value: wrong("photo") + wrong("live"),
        unit: "reads",
        most: 0,
      },
      {
        figure: `one live frame, processor slowed ${SLOWDOWN} times, median`,
        value: share(slowed, 0.5),
        unit: "ms",
        yardstick: { name: "not slowed", value: share(plain, 0.5) },
      },
      {
        figure: `one live frame, processor slowed ${SLOWDOWN} times, p95`,
        value: share(slowed, 0.95),
        unit: "ms",
        yardstick: { name: "not slowed", value: share(plain, 0.95) },
      },
    ];
  } finally {
    await browser.close();
    await bench.close();
  }
}
