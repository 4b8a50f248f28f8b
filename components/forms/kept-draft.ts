/**
 * What is typed and not saved yet, kept on this device: after a reload, a battery, a session that ended. Under an
 * opaque id of the helper, so that one person on a shared phone never sees another's.
 */
const keyOf = (what: string, helperId: string): string => `bismar-draft:${what}:${helperId}`;

/** What was kept, whichever version of the program wrote it; null when there is nothing. */
export function readDraft(what: string, helperId: string): object | null {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(keyOf(what, helperId)) ?? "null");
    return typeof kept === "object" ? kept : null;
  } catch {
    // No storage, or a text that is none of ours: there is simply no draft.
    return null;
  }
}

/** Keeps a draft; null forgets it. */
export function writeDraft(what: string, helperId: string, draft: object | null): void {
  try {
    if (draft) localStorage.setItem(keyOf(what, helperId), JSON.stringify(draft));
    else localStorage.removeItem(keyOf(what, helperId));
  } catch {
    // A full or forbidden storage must not stop the work; what is typed stays on the screen.
  }
}
