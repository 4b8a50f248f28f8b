/** Names that people give to things: stored tidy, and two that read the same are the same. */

/** A typed name as it is stored: trimmed, runs of white space as one space. */
export function tidyName(typed: string): string {
  return typed.trim().replace(/\s+/g, " ");
}

/** Would a reader take these two for one name? "Harbour  road" and "harbour Road" are. */
export function sameName(one: string, other: string): boolean {
  const plain = (name: string) => tidyName(name).normalize("NFC").toLowerCase();
  return plain(one) === plain(other);
}
