/**
 * Contrast of every pair of colour tokens that meets on a screen, light, dark and printed.
 *
 * Source: WCAG 2.2, relative luminance and contrast ratio (w3c/wcag guidelines/terms/20), success criteria
 * 1.4.3 (text 4.5:1) and 1.4.11 (parts of controls 3:1); worked values in
 * fixtures/reference/wcag_contrast_examples.csv, which names the source of each row. The tokens are read
 * from app/globals.css and the pairs are looked for in the screens' own code, so that a new colour or a new
 * pair that fails, fails here.
 */
import { readdirSync, readFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, test } from "vitest";

const ROOT = path.resolve(import.meta.dirname, "../..");
const CSS = readFileSync(path.join(ROOT, "app/globals.css"), "utf8");

/** Relative luminance of "#rrggbb", 0 to 1 (WCAG 2.2, with the corrected threshold 0.04045). */
function luminance(hex: string): number {
  const [red, green, blue] = [1, 3, 5].map((at) => {
    const share = Number.parseInt(hex.slice(at, at + 2), 16) / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function contrast(one: string, other: string): number {
  const [dark, light] = [luminance(one), luminance(other)].sort((a, b) => a - b) as [
    number,
    number,
  ];
  return (light + 0.05) / (dark + 0.05);
}

type Tokens = Record<string, string>;

/** The `--color-…` declarations of the first block after `opening`. */
function tokensAfter(opening: RegExp): Tokens {
  const start = CSS.search(opening);
  if (start < 0) throw new Error(`app/globals.css has no ${opening}`);
  const block = CSS.slice(start).replace(opening, "");
  const found = block
    .slice(0, block.indexOf("}"))
    .matchAll(/--color-([a-z-]+):\s*(#[0-9a-f]{6});/g);
  return Object.fromEntries(
    [...found].map(([, name, hex]): [string, string] => [name ?? "", hex ?? ""]),
  );
}

const light = tokensAfter(/@theme \{/);
const THEMES: Record<string, Tokens> = {
  light,
  dark: { ...light, ...tokensAfter(/@media \(prefers-color-scheme: dark\) \{\s*:root \{/) },
  printed: { ...light, ...tokensAfter(/@media print \{\s*:root \{/) },
};

/** Text on the grounds it may stand on. */
const GROUNDS = ["paper", "card", "well", "act-soft"];
const TEXT_PAIRS: readonly (readonly [text: string, ground: string])[] = [
  ...["ink", "soft", "act", "ok", "warn", "bad"].flatMap((text) =>
    GROUNDS.map((ground) => [text, ground] as const),
  ),
  ...["ok", "warn", "bad"].flatMap((tone) =>
    [tone, "ink", "soft"].map((text) => [text, `${tone}-soft`] as const),
  ),
  ["on-act", "act"],
  ["paper", "ink"],
];

/** What a control cannot be told by without: borders of fields, rings, ticks. */
const CONTROL_PAIRS: readonly (readonly [part: string, ground: string])[] = [
  ...["edge", "act", "bad", "ink", "ok", "warn"].flatMap((part) =>
    ["paper", "card"].map((ground) => [part, ground] as const),
  ),
  ["edge", "well"],
  ["act", "act-soft"],
];

const ratio = (tokens: Tokens, front: string, ground: string): number => {
  const [one, other] = [tokens[front], tokens[ground]];
  if (!one || !other) throw new Error(`app/globals.css has no ${one ? ground : front}`);
  return contrast(one, other);
};

describe("the formula", () => {
  const rows = readFileSync(
    path.join(ROOT, "fixtures/reference/wcag_contrast_examples.csv"),
    "utf8",
  )
    .trim()
    .split("\n")
    .slice(1)
    .map((line) => line.split(","));

  test("the table was read", () => {
    expect(rows.length).toBeGreaterThanOrEqual(10);
  });

  test.each(rows)("%s on %s is %s", (front, ground, recomputed, published) => {
    expect(contrast(front, ground)).toBeCloseTo(Number(recomputed), 5);
    // color.js states its own tolerance as 1e-4.
    if (published) {
      expect(Math.abs(contrast(front, ground) - Number(published))).toBeLessThan(1e-4);
    }
  });
});

describe.each(Object.entries(THEMES))("%s", (_name, tokens) => {
  test.each(TEXT_PAIRS)("text %s on %s reaches 4.5", (text, ground) => {
    expect(ratio(tokens, text, ground)).toBeGreaterThanOrEqual(4.5);
  });

  test.each(CONTROL_PAIRS)("%s of a control on %s reaches 3", (part, ground) => {
    expect(ratio(tokens, part, ground)).toBeGreaterThanOrEqual(3);
  });
});

/** Every string of the screens' code, with its file: where class names are written. */
function classStrings(): { file: string; text: string }[] {
  return ["app", "components"].flatMap((top) =>
    readdirSync(path.join(ROOT, top), { recursive: true, encoding: "utf8" })
      .filter((name) => /\.tsx?$/.test(name))
      .flatMap((name) => {
        const source = readFileSync(path.join(ROOT, top, name), "utf8");
        return [...source.matchAll(/"([^"\n]*)"|`([^`]*)`/g)].map((match) => ({
          file: `${top}/${name}`,
          text: match[1] ?? match[2] ?? "",
        }));
      }),
  );
}

const TEXT_TOKENS = new Set(TEXT_PAIRS.map(([text]) => text));
const PAIRS = new Set(TEXT_PAIRS.map((pair) => pair.join(" on ")));
/** `text-sm` and the like are sizes and ways of setting, not colours. */
const NOT_COLOURS =
  /^(xs|sm|base|lg|xl|[2-5]xl|left|right|center|start|end|wrap|nowrap|balance|pretty|ellipsis|clip|current|transparent|inherit|\[.*|\(.*)$/;

/** Classes `text-…` or `bg-…` with the states before them: "enabled:hover:bg-well" is [enabled:hover:, well]. */
function colours(text: string, kind: "text" | "bg"): { when: string; token: string }[] {
  const found = text.matchAll(
    new RegExp(`(?:^|\\s)((?:[a-z-]+:)*)${kind}-([a-z0-9-]+(?:/[a-z0-9]+)?)!?(?=\\s|$)`, "g"),
  );
  return [...found]
    .map(([, when, token]) => ({ when: when ?? "", token: token ?? "" }))
    .filter(({ token }) => !NOT_COLOURS.test(token.split("/")[0] ?? ""));
}

describe("the screens' own classes", () => {
  const strings = classStrings();

  test("were found", () => {
    expect(strings.filter(({ text }) => colours(text, "text").length > 0).length).toBeGreaterThan(
      50,
    );
  });

  test("set text only in checked tokens, and never thin it with an opacity", () => {
    const wrong = strings.flatMap(({ file, text }) =>
      colours(text, "text")
        .filter(({ token }) => !TEXT_TOKENS.has(token))
        .map(({ token }) => `${file}: text-${token}`),
    );
    expect(wrong).toEqual([]);
  });

  test("set grounds only in tokens that exist", () => {
    const wrong = strings.flatMap(({ file, text }) =>
      colours(text, "bg")
        .filter(({ token }) => !(token in light) && token !== "veil")
        .map(({ token }) => `${file}: bg-${token}`),
    );
    expect(wrong).toEqual([]);
  });

  test("put together only pairs that are checked above", () => {
    const wrong = strings.flatMap(({ file, text }) =>
      colours(text, "bg").flatMap((ground) =>
        colours(text, "text")
          .filter((front) => front.when === ground.when)
          .map((front) => `${front.token} on ${ground.token}`)
          .filter((pair) => !PAIRS.has(pair))
          .map((pair) => `${file}: ${pair}`),
      ),
    );
    expect(wrong).toEqual([]);
  });
});

test("the browser's own bar has the colour of the page", () => {
  const layout = readFileSync(path.join(ROOT, "app/layout.tsx"), "utf8");
  expect(layout).toContain(`light)", color: "${THEMES.light?.paper}"`);
  expect(layout).toContain(`dark)", color: "${THEMES.dark?.paper}"`);
});
