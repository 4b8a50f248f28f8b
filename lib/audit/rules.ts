/** Invariant: a search keeps only what can be read of its address, and each action has words of its own. */
import { searchAuditSchema, type SearchAudit } from "./contract";
import { ACTION_WORDS } from "./terms";

/** "Corrected a weigh-in"; an action that has no words yet is shown as it is stored. */
export function actionWords(action: string): string {
  return Object.hasOwn(ACTION_WORDS, action)
    ? ACTION_WORDS[action as keyof typeof ACTION_WORDS]
    : action;
}

/** "netGrams" as "net grams": a stored field's name as a person reads it. */
export function fieldWords(field: string): string {
  return field
    .replace(/([a-z])([A-Z])/g, "$1 $2")
    .replaceAll("-", " ")
    .toLowerCase();
}

/** The address of the audit's page; whatever cannot be read there is left out, and so is an empty field. */
export function readAuditQuery(
  query: Readonly<Record<string, string | string[] | undefined>>,
): SearchAudit {
  const found: Record<string, unknown> = {};
  for (const name of Object.keys(searchAuditSchema.shape) as (keyof SearchAudit)[]) {
    const value = query[name];
    if (typeof value !== "string" || value.trim() === "") continue;
    const one = searchAuditSchema.shape[name].safeParse(value);
    if (one.success) found[name] = one.data;
  }
  return found;
}

/** The same search as an address, for the next page. */
export function auditAddress(query: SearchAudit, before: string | null): string {
  const values = Object.entries({ ...query, before: before ?? undefined }).filter(
    (entry): entry is [string, string] => typeof entry[1] === "string" && entry[1] !== "",
  );
  return values.length === 0 ? "/audit" : `/audit?${new URLSearchParams(values).toString()}`;
}
