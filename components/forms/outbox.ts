import { aloneAmongTabs, sendingOccasions } from "@/lib/offline/triggers";
import { idbStore } from "@/lib/offline/idb-store";
import { Outbox } from "@/lib/offline/outbox";
import type { QueueItem, Refusal, SendOutcome } from "@/lib/offline/queue";
import type { getAccountEndpoint } from "@/lib/identity/contract";
import { fetchEndpoint, type AddressOf } from "./fetch-endpoint";
import { ProblemError } from "./problem-document";
import { sendRequest } from "./send-request";

const ACCOUNT: AddressOf<typeof getAccountEndpoint> = { method: "GET", path: "/api/account" };
const LOCK = "bismar-outbox";

/** A receipt that keeps nothing but asks something back is no receipt: a person has to answer. */
export type AskingReceipt = { kind: "ask" };

type ReceiptListener = (item: QueueItem, receipt: unknown) => void;
const receiptListeners = new Set<ReceiptListener>();

/** Called for each receipt, whichever page saved the item. */
export function onReceipt(listener: ReceiptListener): () => void {
  receiptListeners.add(listener);
  return () => receiptListeners.delete(listener);
}

/** Refusals that the item is not to blame for. */
const NOT_THIS_SESSION = new Set(["signed-out", "session-ended", "other-helper"]);

async function send(item: QueueItem): Promise<SendOutcome> {
  try {
    const receipt = await sendRequest(item.method, item.path, item.rawBody);
    return isAsking(receipt)
      ? {
          kind: "refused",
          refusal: { code: "ask", sentence: "A question is open.", answer: receipt },
        }
      : { kind: "receipt", receipt };
  } catch (error) {
    if (!(error instanceof ProblemError)) return { kind: "stop", why: "unreachable" };
    const { code, status, detail } = error.problem;
    if (NOT_THIS_SESSION.has(code)) return { kind: "stop", why: "signed-out" };
    if (status >= 500 || status === 429) return { kind: "later" };
    const refusal: Refusal = { code, sentence: detail, answer: error.problem };
    return { kind: "refused", refusal };
  }
}

function isAsking(receipt: unknown): receipt is AskingReceipt {
  return (
    typeof receipt === "object" && receipt !== null && "kind" in receipt && receipt.kind === "ask"
  );
}

let made: { outbox: Outbox; started: boolean } | null = null;

/** The browser's one queue of writes. Only called in the browser. */
export function outbox(): Outbox {
  if (made) return made.outbox;
  const others = "BroadcastChannel" in window ? new BroadcastChannel(LOCK) : null;
  const box = new Outbox({
    store: idbStore(),
    send,
    alone: (work) => aloneAmongTabs(LOCK, work),
    tellOthers: () => others?.postMessage("changed"),
    onReceipt: (item, receipt) => {
      for (const listener of receiptListeners) listener(item, receipt);
    },
  });
  if (others) others.onmessage = () => void box.refresh();
  made = { outbox: box, started: false };
  return box;
}

/**
 * Sends what waits, on every occasion, for as long as the program is open. Whose session it is, is asked only
 * when something waits; a page that knows it anyway says so with `outbox().setHelper`.
 */
export function startOutbox(): void {
  const box = outbox();
  if (!made || made.started) return;
  made.started = true;
  const tick = async (): Promise<void> => {
    await box.refresh();
    const { others, mine } = box.view();
    if (others + mine.length === 0) return;
    // Each time anew: another helper may have signed in on this phone since.
    const account = await fetchEndpoint(ACCOUNT, {}).catch((error: unknown) => {
      if (error instanceof ProblemError) return null;
      return undefined;
    });
    if (account !== undefined) await box.setHelper(account?.personId ?? null);
    await box.sendAll();
  };
  const tryIt = () => quietly(tick);
  sendingOccasions(tryIt);
  tryIt();
}

/** Says whose session this is, where a page knows it from its own reading, and sends what waits. */
export function sendAs(helperId: string): void {
  const box = outbox();
  quietly(async () => {
    await box.setHelper(helperId);
    await box.sendAll();
  });
}

function quietly(work: () => Promise<void>): void {
  void work().catch(() => {
    // No storage (a private window, a full disk): nothing can wait here, and saving says so itself.
  });
}

/** Asks the browser not to clear what waits when the phone runs low on space. It may say no. */
export async function keepStorage(): Promise<void> {
  if ("storage" in navigator && "persist" in navigator.storage) {
    await navigator.storage.persist().catch(() => false);
  }
}
