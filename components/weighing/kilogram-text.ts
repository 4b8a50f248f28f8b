/** Milligrams as they would be typed into a field: "2.160", "0.0125". */
export function kilogramText(milligrams: number): string {
  return `${Math.floor(milligrams / 1_000_000)}.${String(milligrams % 1_000_000)
    .padStart(6, "0")
    .replace(/0{1,3}$/, "")}`;
}
