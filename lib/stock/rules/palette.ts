/**
 * Invariant: a colour's code is made once, from its first name, and never changes, because materials in the
 * ledger name it; names and values may change, and no two colours of the palette have the same name.
 */
import { tidyName } from "@/lib/core/names";

/**
 * The code of a new colour: "Light blue" to "light-blue", with a number when that is taken.
 *
 * @param taken codes of every colour there ever was, retired ones too
 */
export function colourCode(name: string, taken: ReadonlySet<string>): string {
  const plain =
    tidyName(name)
      .normalize("NFD")
      .replace(/[\u0300-\u036f]/g, "")
      .toLowerCase()
      .replace(/[^a-z0-9]+/g, "-")
      .replace(/^-+|-+$/g, "")
      .slice(0, 40) || "colour";
  if (!taken.has(plain)) return plain;
  let number = 2;
  while (taken.has(`${plain}-${number}`)) number += 1;
  return `${plain}-${number}`;
}

/** Is it the same set of codes, each once? What a new order of the palette must be. */
export function isReordering(present: readonly string[], ordered: readonly string[]): boolean {
  if (present.length !== ordered.length) return false;
  const left = new Set(present);
  return ordered.every((code) => left.delete(code));
}
