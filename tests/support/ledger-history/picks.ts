/** Random numbers of one operation, drawn one after another; all zero is the smallest choice. */
export class Picks {
  private at = 0;
  constructor(private readonly numbers: readonly number[]) {}

  private next(): number {
    const number = this.numbers[this.at] ?? 0;
    this.at += 1;
    return number;
  }

  /** A whole number from least to most, both possible. */
  within(least: number, most: number): number {
    return most <= least ? least : least + (this.next() % (most - least + 1));
  }

  /** True in `of` of ten cases. */
  often(of: number): boolean {
    return this.next() % 10 >= 10 - of;
  }

  one<T>(list: readonly T[]): T | undefined {
    return list.length === 0 ? undefined : list[this.within(0, list.length - 1)];
  }

  /** Between one and `most` different members of a list. */
  some<T>(list: readonly T[], most: number): T[] {
    const left = [...list];
    const wanted = Math.min(left.length, this.within(1, most));
    return Array.from({ length: wanted }, () =>
      left.splice(this.within(0, left.length - 1), 1),
    ).flat();
  }
}
