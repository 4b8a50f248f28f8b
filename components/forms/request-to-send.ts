import { newId } from "@/lib/core/ids";

/** A write as it goes out. */
export type Sent = {
  path: string;
  /** What a person said with it; tells a second press from another record. */
  content: string;
  requestId: string;
  rawBody: string;
};

export type SendOptions<Field extends string = string> = {
  /** The record's own id, where the page made it. */
  requestId?: string;
  /** The field that holds the moment of the press: nobody typed it, so a second press does not change it. */
  pressedAt?: Field;
};

/**
 * The request for what a form holds. Invariant: until it is known what became of a write, writes to its address
 * keep its request id. Unchanged, the same bytes go again, and the server gives the answer that was lost; changed,
 * it either takes them or says that the first ones did arrive. Nothing is written twice.
 *
 * @param data without the path's parameters and the request id
 * @param unanswered the last write, while no answer came to it
 */
export function requestToSend(
  path: string,
  data: Readonly<Record<string, unknown>>,
  { requestId, pressedAt }: SendOptions,
  unanswered: Sent | null,
): Sent {
  const before = unanswered?.path === path ? unanswered : null;
  const content = JSON.stringify(data, (key, value: unknown) =>
    key === pressedAt ? undefined : value,
  );
  const id = requestId ?? before?.requestId ?? newId();
  return before?.content === content && before.requestId === id
    ? before
    : { path, content, requestId: id, rawBody: JSON.stringify({ ...data, requestId: id }) };
}
