/** What a bench measures: a figure beside what it is compared with, both from the same run. */
export type BenchRow = {
  /** "requests a second at 8 connections" */
  figure: string;
  value: number;
  unit: string;
  /** What the value is held against: the same work done in the plainest way, or the same at another size. */
  yardstick?: { name: string; value: number };
  /** How far value / yardstick may go; without a yardstick, how far the value itself may go. */
  most?: number;
  least?: number;
};

/** What every tests/bench/NAME.bench.ts exports. */
export type Bench = {
  name: string;
  /** A soak runs long and only when it is named. */
  soak: boolean;
  run: () => Promise<BenchRow[]>;
};
