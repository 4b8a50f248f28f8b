/**
 * Tables kept on this device while they are not saved: after a reload, a battery, a lost signal. Under an opaque id
 * of the helper, so that one person on a shared phone never sees another's.
 */
import { draftText, readDraftText, type Table } from "./table-text";
import { NOTHING_KEPT, type Base } from "./session-state";

const PREFIX = "bismar-draft:sorting-table:";
const keyOf = (helperId: string, id: string): string => `${PREFIX}${helperId}:${id}`;

export type KeptTable = { id: string; table: Table; base: Base };

type Stored = { codes?: unknown; content?: unknown };

const tableText = ({ codes, draft }: Table) => ({ codes, content: draftText(draft) });

function readTable(stored: unknown): Table | null {
  if (typeof stored !== "object" || stored === null) return null;
  const { codes, content } = stored as Stored;
  if (!Array.isArray(codes) || typeof content !== "string") return null;
  return {
    codes: codes.filter((code): code is string => typeof code === "string"),
    draft: readDraftText(content),
  };
}

function read(key: string, id: string): KeptTable | null {
  try {
    const stored: unknown = JSON.parse(localStorage.getItem(key) ?? "null");
    const table = readTable(stored);
    if (!table) return null;
    const { base } = stored as { base?: { version?: unknown } };
    const based = readTable(base);
    return {
      id,
      table,
      base:
        based && typeof base?.version === "number"
          ? { version: base.version, table: based }
          : NOTHING_KEPT,
    };
  } catch {
    // No storage, or a text that another version wrote: nothing is kept.
    return null;
  }
}

export function readKept(helperId: string, id: string): KeptTable | null {
  return read(keyOf(helperId, id), id);
}

/** Every table of this helper on this device. */
export function listKept(helperId: string): KeptTable[] {
  try {
    const own = keyOf(helperId, "");
    return Object.keys(localStorage)
      .filter((key) => key.startsWith(own))
      .flatMap((key) => read(key, key.slice(own.length)) ?? []);
  } catch {
    return [];
  }
}

export function keepTable(helperId: string, { id, table, base }: KeptTable): void {
  try {
    localStorage.setItem(
      keyOf(helperId, id),
      JSON.stringify({
        ...tableText(table),
        base: { version: base.version, ...tableText(base.table) },
      }),
    );
  } catch {
    // A full or forbidden storage must not stop the sorting; what is typed stays on the screen.
  }
}

export function forgetTable(helperId: string, id: string): void {
  try {
    localStorage.removeItem(keyOf(helperId, id));
  } catch {
    // Nothing was kept there.
  }
}
