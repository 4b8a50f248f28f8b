/** Names that people give to things: stored tidy, and two that read the same are the same. */
import { AppError } from "./errors";

/** A typed name as it is stored: trimmed, runs of white space as one space. */
export function tidyName(typed: string): string {
  return typed.trim().replace(/\s+/g, " ");
}

/** Would a reader take these two for one name? "Harbour  road" and "harbour Road" are. */
export function sameName(one: string, other: string): boolean {
  const plain = (name: string) => tidyName(name).normalize("NFC").toLowerCase();
  return plain(one) === plain(other);
}

/**
 * Refuses a name that another of its kind bears.
 *
 * @param others all of the kind, retired ones too
 * @param except the one that is being changed
 * @throws AppError `name-in-use` on the field `name`
 */
export function requireFreeName(
  others: readonly { id: string; name: string }[],
  name: string,
  except: string | null = null,
): void {
  const taken = others.find((other) => other.id !== except && sameName(other.name, name));
  if (taken) throw new AppError("name-in-use", { name: taken.name }, ["name"]);
}
