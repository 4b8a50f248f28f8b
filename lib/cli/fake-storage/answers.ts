/** Answers of the stand-in. */
import type { IncomingMessage, ServerResponse } from "node:http";

/** A refusal with a status; anything else that is thrown is a failure of the stand-in. */
export class Refusal extends Error {
  constructor(
    readonly status: number,
    reason: string,
  ) {
    super(reason);
  }
}

const DRAIN_MS = 30_000;

/**
 * Reads what is left of a request's body. An answer before that would reset the connection, and the sender
 * would see a broken line in place of the answer.
 */
export function drain(request: IncomingMessage): Promise<void> {
  if (request.complete || request.destroyed) return Promise.resolve();
  return new Promise((resolve) => {
    const tooLong = setTimeout(() => request.destroy(), DRAIN_MS);
    const done = (): void => {
      clearTimeout(tooLong);
      resolve();
    };
    request.once("end", done);
    request.once("close", done);
    request.resume();
  });
}

/** One answer in JSON. */
export function answerJson(response: ServerResponse, status: number, body: unknown): void {
  if (response.headersSent || response.destroyed) return;
  const text = JSON.stringify(body);
  response.writeHead(status, {
    "content-type": "application/json",
    "content-length": Buffer.byteLength(text),
    "x-content-type-options": "nosniff",
    "cache-control": "no-store",
  });
  response.end(text);
}

const MOST_JSON_BYTES = 1024 * 1024;

/**
 * The JSON object of a request.
 *
 * @throws Refusal 400 or 413
 */
export async function readJsonObject(
  request: IncomingMessage,
): Promise<Readonly<Record<string, unknown>>> {
  const chunks: Buffer[] = [];
  let length = 0;
  for await (const chunk of request as AsyncIterable<Buffer>) {
    length += chunk.length;
    if (length <= MOST_JSON_BYTES) chunks.push(chunk);
  }
  if (length > MOST_JSON_BYTES) throw new Refusal(413, "too much");
  let body: unknown;
  try {
    body = JSON.parse(Buffer.concat(chunks).toString("utf8"));
  } catch {
    throw new Refusal(400, "no JSON");
  }
  if (typeof body !== "object" || body === null || Array.isArray(body)) {
    throw new Refusal(400, "no JSON object");
  }
  return body as Readonly<Record<string, unknown>>;
}
