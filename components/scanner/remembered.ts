/** What this device remembers of its scanner: a camera's name and whether it is quiet. Nothing about people. */
const PREFIX = "bismar-scan:";

export function readSetting(name: string): string | null {
  try {
    return localStorage.getItem(PREFIX + name);
  } catch {
    // A browser that keeps nothing for this page: every visit starts anew.
    return null;
  }
}

export function writeSetting(name: string, value: string | null): void {
  try {
    if (value === null) localStorage.removeItem(PREFIX + name);
    else localStorage.setItem(PREFIX + name, value);
  } catch {
    // Full, or forbidden: the choice holds for this visit.
  }
}
