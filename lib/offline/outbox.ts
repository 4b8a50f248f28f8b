/** The queue at work: keeps items in a store and sends them, one tab at a time. */
import {
  afterSending,
  itemsToSend,
  markSending,
  newItem,
  viewFor,
  EMPTY_VIEW,
  type NewItem,
  type QueueItem,
  type QueueView,
  type SendOutcome,
} from "./queue";

export type QueueStore = {
  all(): Promise<QueueItem[]>;
  put(item: QueueItem): Promise<void>;
  /** Writes only while the item is still there, so that a deletion by hand wins over a late answer. */
  replace(item: QueueItem): Promise<void>;
  remove(requestId: string): Promise<void>;
};

export type OutboxParts = {
  store: QueueStore;
  send(item: QueueItem): Promise<SendOutcome>;
  /** Runs the work if no other tab sends just now; answers null if one does. */
  alone<T>(work: () => Promise<T>): Promise<T | null>;
  /** Other tabs show the same queue. */
  tellOthers(): void;
  onReceipt(item: QueueItem, receipt: unknown): void;
};

export class Outbox {
  private readonly parts: OutboxParts;
  private readonly listeners = new Set<() => void>();
  private helper: string | null = null;
  private shown: QueueView = EMPTY_VIEW;
  private passUnderWay: Promise<void> | null = null;

  constructor(parts: OutboxParts) {
    this.parts = parts;
  }

  /** For useSyncExternalStore: the same object until something changed. */
  readonly view = (): QueueView => this.shown;

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  /** Names whose session this is; null for nobody known, and then nothing is sent. */
  async setHelper(helper: string | null): Promise<void> {
    if (this.helper === helper) return;
    this.helper = helper;
    await this.refresh();
  }

  /** Reads the store again: another tab may have changed it. */
  async refresh(): Promise<void> {
    this.shown = viewFor(await this.parts.store.all(), this.helper);
    for (const listener of this.listeners) listener();
  }

  /**
   * Keeps a new item, then tries to send it at once.
   *
   * @returns how that first sending ended
   * @throws when the device cannot keep it (no storage): then nothing was queued or sent
   */
  async add(made: NewItem): Promise<SendOutcome> {
    const item = newItem(made);
    await this.parts.store.put(item);
    await this.changed();
    const outcome = await this.parts.alone(() => this.sendOne(item));
    return outcome ?? { kind: "stop", why: "other-tab" };
  }

  /** Sends what waits, oldest first. A pass under way is joined, not doubled. */
  sendAll(): Promise<void> {
    this.passUnderWay ??= this.pass().finally(() => {
      this.passUnderWay = null;
    });
    return this.passUnderWay;
  }

  /** A person deletes an item, or takes it back into a form. */
  async drop(requestId: string): Promise<void> {
    await this.parts.store.remove(requestId);
    await this.changed();
  }

  private async pass(): Promise<void> {
    const helper = this.helper;
    if (helper === null) return;
    if (itemsToSend(await this.parts.store.all(), helper).length === 0) return;
    await this.parts.alone(async () => {
      const tried = new Set<string>();
      for (;;) {
        // Read again each time: others may have sent or deleted some, and new ones may have come.
        const next = itemsToSend(await this.parts.store.all(), helper).find(
          (item) => !tried.has(item.requestId),
        );
        if (!next || this.helper !== helper) return;
        tried.add(next.requestId);
        const outcome = await this.sendOne(next);
        if (outcome.kind === "stop") return;
      }
    });
  }

  private async sendOne(item: QueueItem): Promise<SendOutcome> {
    const sending = markSending(item);
    await this.parts.store.replace(sending);
    await this.changed();
    const outcome = await this.parts.send(sending);
    const after = afterSending(sending, outcome);
    if (after) await this.parts.store.replace(after);
    else await this.parts.store.remove(item.requestId);
    await this.changed();
    if (outcome.kind === "receipt") this.parts.onReceipt(item, outcome.receipt);
    return outcome;
  }

  private async changed(): Promise<void> {
    await this.refresh();
    this.parts.tellOthers();
  }
}
