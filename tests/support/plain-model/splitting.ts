/** How an entry's lines are split into parts, from the written rules alone. */
import {
  DIMENSIONS,
  UNKNOWN_ORIGIN,
  type Account,
  type Basis,
  type Dimension,
  type EntryKind,
} from "@/lib/ledger/terms";
import { shares, type Weight } from "./largest-remainder";
import { partsHeld, sumOf, type Book } from "./movements";

/** A line as a person gives it: which account, how much. */
export type Given = {
  account: Account;
  cause?: string;
  originNo?: number;
  holderId?: number;
  materialId?: number;
  grams: number;
  basis?: Basis | null;
  scaleNumber?: number | null;
  mpeMilligrams?: number | null;
  from?: {
    materialId: number;
    parts: Readonly<Record<Dimension, readonly (readonly [key: number, grams: number])[]>>;
  };
};

/** A part of a line, with the material it came from and the material it is now. */
export type Part = { came: number; material: number; dim: Dimension; key: number; grams: number };
export type SplitLine = { given: Given; parts: Part[] };

type Cell = { material: number; dim: Dimension; key: number; grams: number };

const HOLDERS = new Set<Account>(["bag", "lot", "run", "reject-bin", "pieces"]);
/** Arriving here changes the row; lines elsewhere stand in the row that they left. */
const CHANGES_ROW = new Set<Account>(["bag", "lot", "run", "reject-bin"]);
const ORDER: readonly (readonly Account[])[] = [
  ["pieces"],
  ["lot"],
  ["bag", "run"],
  ["reject-bin"],
  ["passed-on"],
  ["disposed"],
  ["loss"],
  ["difference"],
  ["before-opening"],
];
const unknown: Record<Dimension, number> = { O: UNKNOWN_ORIGIN, H: 0 };

/** Grams in the proportion of parts; unknown and not heated when there are none. */
function inProportion(grams: number, parts: readonly Weight[], dim: Dimension): Weight[] {
  const given = shares(grams, parts);
  if (given.size === 0) return [{ key: unknown[dim], grams }];
  return [...given].map(([key, share]) => ({ key, grams: share }));
}

function materialsOf(cells: readonly Cell[]): Weight[] {
  const found = new Map<number, number>();
  for (const cell of cells) {
    if (cell.dim === "O") found.set(cell.material, (found.get(cell.material) ?? 0) + cell.grams);
  }
  return [...found].map(([key, grams]) => ({ key, grams }));
}

const partsIn = (cells: readonly Cell[], material: number, dim: Dimension): Cell[] =>
  cells.filter((cell) => cell.material === material && cell.dim === dim);

/** Takes grams of one material out of the pool, each dimension alone. */
function takeOf(pool: Cell[], material: number, grams: number): Cell[] {
  const taken: Cell[] = [];
  for (const dim of DIMENSIONS) {
    for (const [key, share] of shares(grams, partsIn(pool, material, dim))) {
      const cell = partsIn(pool, material, dim).find((candidate) => candidate.key === key);
      if (cell) cell.grams -= share;
      taken.push({ material, dim, key, grams: share });
    }
  }
  return taken;
}

/** Takes grams out of the pool: by material first, then by key inside each material. */
function take(pool: Cell[], grams: number): Cell[] {
  return [...shares(grams, materialsOf(pool))].flatMap(([material, share]) =>
    takeOf(pool, material, share),
  );
}

function put(pool: Cell[], cell: Cell): void {
  const found = partsIn(pool, cell.material, cell.dim).find((other) => other.key === cell.key);
  if (found) found.grams += cell.grams;
  else pool.push({ ...cell });
}

const isGain = (line: Given): boolean =>
  (line.account === "loss" || line.account === "difference") && line.grams < 0 && !line.from;

/** What a line that enters or is taken brings, as cells above zero. */
function broughtBy(book: Book, line: Given): Cell[] {
  const material = line.from?.materialId ?? line.materialId ?? 0;
  return DIMENSIONS.flatMap((dim) => {
    let parts: Weight[];
    if (line.from) {
      parts = line.from.parts[dim].map(([key, grams]) => ({ key, grams: Math.abs(grams) }));
    } else if (HOLDERS.has(line.account)) {
      parts = inProportion(-line.grams, partsHeld(book, line.holderId ?? 0, material, dim), dim);
    } else {
      parts = [{ key: dim === "O" ? (line.originNo ?? 0) : 0, grams: -line.grams }];
    }
    return parts.map((part) => ({ material, dim, ...part }));
  });
}

/** A gain enters in the proportion of what was taken; when nothing was, of the holder that receives it. */
function gained(
  book: Book,
  line: Given,
  pool: readonly Cell[],
  receiver: Given | undefined,
): Cell[] {
  const grams = -line.grams;
  const materials = shares(grams, materialsOf(pool));
  if (materials.size > 0) {
    return [...materials].flatMap(([material, share]) =>
      DIMENSIONS.flatMap((dim) =>
        inProportion(share, partsIn(pool, material, dim), dim).map((part) => ({
          material,
          dim,
          ...part,
        })),
      ),
    );
  }
  const material = receiver?.materialId ?? 0;
  return DIMENSIONS.flatMap((dim) =>
    inProportion(grams, partsHeld(book, receiver?.holderId ?? 0, material, dim), dim).map(
      (part) => ({ material, dim, ...part }),
    ),
  );
}

function rank(line: Given): number {
  return ORDER.findIndex((accounts) => accounts.includes(line.account));
}

const entering = (line: Given, cells: readonly Cell[]): SplitLine => ({
  given: line,
  parts: cells
    .filter((cell) => cell.grams !== 0)
    .map((cell) => ({ ...cell, came: cell.material, grams: -cell.grams })),
});

/** Splits the lines of one entry, the holdings being what the book says at this moment. */
export function splitLines(book: Book, kind: EntryKind, lines: readonly Given[]): SplitLine[] {
  if (sumOf(lines) !== 0) throw new Error("the lines of an entry add up to zero");
  const pool: Cell[] = [];
  const result: SplitLine[] = [];
  const enter = (line: Given, cells: readonly Cell[]): void => {
    for (const cell of cells) put(pool, cell);
    result.push(entering(line, cells));
  };
  for (const line of lines.filter((one) => one.grams < 0 && !isGain(one))) {
    enter(line, broughtBy(book, line));
  }
  const outputs = lines
    .filter((line) => line.grams > 0)
    .sort(
      (a, b) =>
        rank(a) - rank(b) ||
        (a.holderId ?? 0) - (b.holderId ?? 0) ||
        Number((a.cause ?? "") > (b.cause ?? "")) - Number((a.cause ?? "") < (b.cause ?? "")),
    );
  for (const line of lines.filter(isGain)) enter(line, gained(book, line, pool, outputs[0]));

  const fromRun = lines.some((line) => line.account === "run" && line.grams < 0);
  const heats = kind === "finish" && fromRun;
  const drawn = new Set(materialsOf(pool).map((weight) => weight.key));
  for (const line of outputs) {
    const own = line.materialId ?? 0;
    // A lot of a drawn material takes that material first. What goes into a run keeps its row.
    const ownFirst =
      (fromRun && line.account === "lot") || line.account === "run" ? drawn.has(own) : false;
    const ownLeft = ownFirst ? sumOf(partsIn(pool, own, "O")) : 0;
    const unused = Math.min(line.grams, ownLeft);
    const taken = [
      ...(unused > 0 ? takeOf(pool, own, unused) : []),
      ...(line.grams > unused ? take(pool, line.grams - unused) : []),
    ];
    result.push({
      given: line,
      parts: taken
        .filter((cell) => cell.grams !== 0)
        .map((cell) => {
          return {
            came: cell.material,
            material: CHANGES_ROW.has(line.account) ? own : cell.material,
            dim: cell.dim,
            key: cell.dim === "H" && heats ? Math.min(cell.key + 1, 3) : cell.key,
            grams: cell.grams,
          };
        }),
    });
  }
  return result;
}
