import { keepStorage, outbox } from "@/components/forms/outbox";
import { ProblemError, UNREACHABLE_SENTENCE } from "@/components/forms/problem-document";
import { sendRequest } from "@/components/forms/send-request";
import type { ProblemDocument } from "@/lib/core/errors";
import { captureSentence } from "@/lib/core/capture-messages";
import type { SendOutcome } from "@/lib/offline/queue";
import type { WeighInReceipt } from "@/lib/weighing/contract/weigh-ins";
import { WEIGH_IN_ADDRESS } from "@/lib/weighing/terms";
import type { WeighInEndpointInput } from "./weigh-in-body";

type Ask = Extract<WeighInReceipt, { kind: "ask" }>;
export type KeptReceipt = Exclude<WeighInReceipt, Ask>;

/** What became of a ticket that was saved. */
export type SaveResult =
  | { kind: "receipt"; receipt: KeptReceipt }
  | { kind: "ask"; questions: Ask["questions"] }
  /** It waits on this device and is sent by itself. */
  | { kind: "waiting" }
  /** Nothing was kept anywhere but in the form. */
  | { kind: "refused"; sentence: string; problem: ProblemDocument | null; signIn: boolean };

/** After this long the helper goes on with the next bag; the ticket waits meanwhile. */
const PATIENCE_MS = 5000;

/**
 * Saves a ticket: into the queue first, so that nothing that happens to the page can lose it, then to the
 * server. What the server refuses while the helper looks on goes back to the form and leaves the queue.
 */
export async function saveTicket(input: WeighInEndpointInput, label: string): Promise<SaveResult> {
  const { method, path } = WEIGH_IN_ADDRESS;
  const rawBody = JSON.stringify(input);
  const { requestId, helperId } = input;
  if (!helperId) throw new TypeError("a ticket belongs to a helper");
  let sending: Promise<SendOutcome>;
  try {
    await outbox().setHelper(helperId);
    sending = outbox().add({
      requestId,
      method,
      path,
      rawBody,
      helper: helperId,
      madeAt: input.occurredAt,
      label,
    });
  } catch {
    return sendUnkept(method, path, rawBody);
  }
  void keepStorage();
  const tooLong = new Promise<null>((resolve) => setTimeout(() => resolve(null), PATIENCE_MS));
  let outcome: SendOutcome | null;
  try {
    outcome = await Promise.race([sending, tooLong]);
  } catch {
    return sendUnkept(method, path, rawBody);
  }
  if (outcome === null || outcome.kind === "later") return { kind: "waiting" };
  if (outcome.kind === "receipt") {
    return { kind: "receipt", receipt: outcome.receipt as KeptReceipt };
  }
  if (outcome.kind === "stop" && outcome.why !== "signed-out") return { kind: "waiting" };
  await outbox().drop(requestId);
  if (outcome.kind === "stop") {
    return {
      kind: "refused",
      sentence: captureSentence("session-ended"),
      problem: null,
      signIn: true,
    };
  }
  const { code, answer } = outcome.refusal;
  if (code === "ask") return { kind: "ask", questions: (answer as Ask).questions };
  return {
    kind: "refused",
    sentence: outcome.refusal.sentence,
    problem: answer as ProblemDocument,
    signIn: false,
  };
}

/** A device that can keep nothing (a private window, a full disk) still saves while the server is there. */
async function sendUnkept(method: string, path: string, rawBody: string): Promise<SaveResult> {
  try {
    const receipt = (await sendRequest(method, path, rawBody)) as WeighInReceipt;
    return receipt.kind === "ask"
      ? { kind: "ask", questions: receipt.questions }
      : { kind: "receipt", receipt };
  } catch (error) {
    if (error instanceof ProblemError) {
      const { problem } = error;
      return { kind: "refused", sentence: problem.detail, problem, signIn: problem.status === 401 };
    }
    return { kind: "refused", sentence: UNREACHABLE_SENTENCE, problem: null, signIn: false };
  }
}
