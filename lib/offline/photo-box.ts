/** The queue of photos at work: keeps pictures in a store and sends them, a few at a time. */
import type { Photo } from "@/lib/uploads/contract";
import {
  afterPhotoSending,
  EMPTY_PHOTO_VIEW,
  markPhotoRetried,
  markPhotoSending,
  markPhotoStopped,
  MOST_AT_ONCE,
  newPhotoItem,
  photosToSend,
  photoViewFor,
  type NewPhoto,
  type PhotoItem,
  type PhotoOutcome,
  type PhotoQueueView,
} from "./photo-queue";

export type PhotoStore = {
  all(): Promise<PhotoItem[]>;
  put(item: PhotoItem): Promise<void>;
  /** Writes only while the item is still there, so that a deletion by hand wins over a late answer. */
  replace(item: PhotoItem): Promise<void>;
  remove(photoId: string): Promise<void>;
};

export type PhotoBoxParts = {
  store: PhotoStore;
  upload(
    item: PhotoItem,
    watch: { signal: AbortSignal; onProgress: (percent: number) => void },
  ): Promise<PhotoOutcome>;
  /** Runs the work if no other tab sends this picture just now; answers null if one does. */
  alone<T>(photoId: string, work: () => Promise<T>): Promise<T | null>;
  /** Other tabs show the same queue. */
  tellOthers(): void;
  now(): number;
};

type Pass = { tried: Set<string>; now: number | null; halted: boolean };
type SentListener = (item: PhotoItem, photo: Photo) => void;

export class PhotoBox {
  private readonly parts: PhotoBoxParts;
  private readonly listeners = new Set<() => void>();
  private readonly sentListeners = new Set<SentListener>();
  private readonly onTheirWay = new Map<string, AbortController>();
  private readonly progress = new Map<string, number>();
  /** What the device could not keep (a private window, a full disk): it lasts as long as the page. */
  private readonly unkept = new Map<string, PhotoItem>();
  private items: readonly PhotoItem[] = [];
  private helper: string | null = null;
  private shown: PhotoQueueView = EMPTY_PHOTO_VIEW;

  constructor(parts: PhotoBoxParts) {
    this.parts = parts;
  }

  /** For useSyncExternalStore: the same object until something changed. */
  readonly view = (): PhotoQueueView => this.shown;

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  /** Called for each picture that the server acknowledged, whoever added it. */
  onSent(listener: SentListener): () => void {
    this.sentListeners.add(listener);
    return () => this.sentListeners.delete(listener);
  }

  /** Names whose session this is; null for nobody known, and then nothing is sent. */
  async setHelper(helper: string | null): Promise<void> {
    if (this.helper === helper) return;
    this.helper = helper;
    await this.refresh();
  }

  /** Reads the store again: another tab may have changed it. */
  async refresh(): Promise<void> {
    const kept = await this.parts.store.all().catch(() => this.items);
    this.items = [
      ...kept.filter(({ photoId }) => !this.unkept.has(photoId)),
      ...this.unkept.values(),
    ];
    this.show();
  }

  /**
   * Keeps new pictures and begins to send them.
   *
   * @returns whether this device keeps all of them through a reload
   */
  async add(photos: readonly NewPhoto[]): Promise<boolean> {
    let kept = true;
    for (const photo of photos) {
      const item = newPhotoItem(photo);
      try {
        await this.parts.store.put(item);
      } catch {
        this.unkept.set(item.photoId, item);
        kept = false;
      }
    }
    await this.changed();
    void this.sendAll();
    return kept;
  }

  /**
   * Sends what waits, oldest first, each at most once in this pass.
   *
   * @param impatient those too that failed a moment ago
   */
  async sendAll(impatient = false): Promise<void> {
    const pass: Pass = {
      tried: new Set(),
      now: impatient ? null : this.parts.now(),
      halted: false,
    };
    await Promise.all(Array.from({ length: MOST_AT_ONCE }, () => this.lane(pass)));
  }

  /** Stops a sending by hand; the picture stays. */
  async cancel(photoId: string): Promise<void> {
    const controller = this.onTheirWay.get(photoId);
    if (controller) controller.abort();
    else await this.write(photoId, markPhotoStopped);
  }

  async retry(photoId: string): Promise<void> {
    await this.write(photoId, markPhotoRetried);
    await this.sendAll();
  }

  /** A person deletes a picture that is not sent. */
  async drop(photoId: string): Promise<void> {
    await this.remove(photoId);
    this.onTheirWay.get(photoId)?.abort();
    await this.changed();
  }

  /** A person gives up what they were photographing: its pictures go, unless they were sent already. */
  async dropSubject(subjectId: string): Promise<void> {
    for (const { photoId, helper } of this.items.filter((item) => item.subjectId === subjectId)) {
      if (helper === this.helper) await this.drop(photoId);
    }
  }

  private async lane(pass: Pass): Promise<void> {
    while (!pass.halted && this.helper !== null && this.onTheirWay.size < MOST_AT_ONCE) {
      const next = photosToSend(this.items, this.helper, pass.now).find(
        ({ photoId }) => !pass.tried.has(photoId) && !this.onTheirWay.has(photoId),
      );
      if (!next) return;
      pass.tried.add(next.photoId);
      const outcome = await this.sendOne(next);
      if (outcome?.kind === "stop") pass.halted = true;
    }
  }

  private async sendOne(item: PhotoItem): Promise<PhotoOutcome | null> {
    const { photoId } = item;
    const controller = new AbortController();
    // At once, without waiting for anything: it is what keeps a picture from being sent twice.
    this.onTheirWay.set(photoId, controller);
    const { signal } = controller;
    const onProgress = (percent: number) => {
      this.progress.set(photoId, percent);
      this.show();
    };
    try {
      const outcome = await this.parts.alone(photoId, async () => {
        await this.write(photoId, markPhotoSending);
        return signal.aborted
          ? ({ kind: "cancelled" } as const)
          : this.parts.upload(item, { signal, onProgress });
      });
      if (outcome === null) return null;
      const sending = this.items.find((known) => known.photoId === photoId) ?? item;
      const after = afterPhotoSending(sending, outcome, this.parts.now());
      if (after) await this.write(photoId, () => after);
      else await this.remove(photoId);
      if (outcome.kind === "sent") {
        for (const listener of this.sentListeners) listener(item, outcome.photo);
      }
      return outcome;
    } finally {
      this.onTheirWay.delete(photoId);
      this.progress.delete(photoId);
      await this.changed();
    }
  }

  private async write(photoId: string, change: (item: PhotoItem) => PhotoItem): Promise<void> {
    const item = this.items.find((known) => known.photoId === photoId);
    if (!item) return;
    const next = change(item);
    if (this.unkept.has(photoId)) this.unkept.set(photoId, next);
    // A picture that cannot be written to any more is still sent; its state is then only shown here.
    else await this.parts.store.replace(next).catch(() => void this.unkept.set(photoId, next));
    await this.changed();
  }

  private async remove(photoId: string): Promise<void> {
    this.unkept.delete(photoId);
    // The server has it, or a person gave it up; if it cannot be taken off, the next sending tells the same.
    await this.parts.store.remove(photoId).catch(() => undefined);
  }

  private async changed(): Promise<void> {
    await this.refresh();
    this.parts.tellOthers();
  }

  private show(): void {
    this.shown = photoViewFor(this.items, this.helper, this.progress);
    for (const listener of this.listeners) listener();
  }
}
