/**
 * What must stand, unseen, behind each figure of a column so that right-aligned mono figures meet on the
 * decimal point: "2.16" beside "11" and "0.875" needs "0", ".000" and "".
 *
 * @param figures the column's texts; null where a cell holds no figure
 * @returns for each figure the missing characters
 */
export function decimalPadding(figures: readonly (string | null)[]): string[] {
  const tails = figures.map((figure) => {
    const text = figure ?? "";
    const point = text.search(/[.,](?=\d+$)/);
    return point < 0 ? "" : text.slice(point);
  });
  const longest = tails.reduce((most, tail) => Math.max(most, tail.length), 0);
  return tails.map((tail, index) => {
    if (figures[index] === null || tail.length === longest) return "";
    return tail === "" ? `.${"0".repeat(longest - 1)}` : "0".repeat(longest - tail.length);
  });
}
