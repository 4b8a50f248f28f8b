/**
 * Invariant: every row of a report balances to the gram: opening + collected + other in + opening counts +
 * re-sorted − disposed − passed on − loss − difference − pieces − before opening = closing; over all rows
 * re-sorted is zero.
 */

/** Whole grams of one report row over a period, sources with their sign turned. */
export type Moved = {
  /** Change of what the shed holds in this row. */
  held: number;
  collected: number;
  otherIn: number;
  /** Counted on the scheme's first day. */
  openingCount: number;
  accepted: number;
  rejected: number;
  disposed: number;
  passedProven: number;
  passedUnproven: number;
  loss: number;
  /** Positive: the book held more than the scale found. */
  difference: number;
  pieces: number;
  bags: number;
  /** Of what was collected: history from before the scheme's first day, which never was in the shed's book. */
  beforeOpening: number;
};

export type Figures = Moved & {
  opening: number;
  /** What sorting and other work moved into this row from others; zero over all rows. */
  resorted: number;
  closing: number;
  /** Pieces and what was passed on with a receipt. */
  diverted: number;
};

export const NOTHING_MOVED: Moved = {
  held: 0,
  collected: 0,
  otherIn: 0,
  openingCount: 0,
  accepted: 0,
  rejected: 0,
  disposed: 0,
  passedProven: 0,
  passedUnproven: 0,
  loss: 0,
  difference: 0,
  pieces: 0,
  bags: 0,
  beforeOpening: 0,
};

export const MOVED_KEYS = Object.keys(NOTHING_MOVED) as readonly (keyof Moved)[];

/** a + b, column by column. */
export function addMoved(a: Moved, b: Moved): Moved {
  const sum = { ...a };
  for (const key of MOVED_KEYS) sum[key] = a[key] + b[key];
  return sum;
}

/** Did anything at all move? A row without movement and without stock is not shown. */
export function isStill(moved: Moved): boolean {
  return MOVED_KEYS.every((key) => moved[key] === 0);
}

/**
 * A row's figures (ledger.md, A report's row).
 *
 * @param opening grams held in this row before the period
 */
export function figuresOf(opening: number, moved: Moved): Figures {
  const out =
    moved.disposed +
    moved.passedProven +
    moved.passedUnproven +
    moved.loss +
    moved.difference +
    moved.pieces +
    moved.beforeOpening;
  return {
    ...moved,
    opening,
    resorted: moved.held - moved.collected - moved.otherIn - moved.openingCount + out,
    closing: opening + moved.held,
    diverted: moved.pieces + moved.passedProven,
  };
}

/** Adds rows up. The opening of a sum over several months is that of the first, so pass one month's rows. */
export function sumFigures(rows: readonly Figures[]): Figures {
  let opening = 0;
  let moved = NOTHING_MOVED;
  for (const row of rows) {
    opening += row.opening;
    moved = addMoved(moved, row);
  }
  return figuresOf(opening, moved);
}

/** Opening + in − out − closing in grams: zero for a row that balances. */
export function imbalanceOf(row: Figures): number {
  return (
    row.opening +
    row.collected +
    row.otherIn +
    row.openingCount +
    row.resorted -
    row.disposed -
    row.passedProven -
    row.passedUnproven -
    row.loss -
    row.difference -
    row.pieces -
    row.beforeOpening -
    row.closing
  );
}

export type Share = { part: number; whole: number };

/** Diversion rate: diverted / (diverted + disposed + losses); null when nothing left the shed. */
export function diversionOf(row: Figures): Share | null {
  const whole = row.diverted + row.disposed + row.loss;
  return whole > 0 ? { part: row.diverted, whole } : null;
}

/** Rejects as a share of what was sorted; null when nothing was. */
export function rejectShareOf(row: Figures): Share | null {
  const whole = row.accepted + row.rejected;
  return whole > 0 ? { part: row.rejected, whole } : null;
}

/** "90.4 %", rounded half up from whole numbers. */
export function formatShare({ part, whole }: Share): string {
  const tenths = Math.floor((part * 2000 + whole) / (2 * whole));
  return `${Math.floor(tenths / 10)}.${tenths % 10} %`;
}
