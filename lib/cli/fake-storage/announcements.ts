/** What the program told about files that are to come, and what it answered about those that came. */

export type Announcement = {
  metadata: unknown;
  callbackUrl: string;
  slug: string;
  announcedAt: number;
};

/** An address runs out after an hour at most. */
const KEPT_MS = 2 * 60 * 60 * 1000;

export class Announcements {
  readonly #announced = new Map<string, Announcement>();
  readonly #results = new Map<string, unknown>();

  add(key: string, announcement: Announcement): void {
    for (const [old, { announcedAt }] of this.#announced) {
      if (announcedAt < announcement.announcedAt - KEPT_MS) this.#announced.delete(old);
    }
    this.#announced.set(key, announcement);
  }

  find(key: string): Announcement | null {
    return this.#announced.get(key) ?? null;
  }

  /** The program says what its completion gave. */
  setResult(key: string, data: unknown): void {
    this.#results.set(key, data);
  }

  /** Takes the completion's result away; undefined when it never came. */
  takeResult(key: string): unknown {
    const result = this.#results.get(key);
    this.#results.delete(key);
    return result;
  }
}
