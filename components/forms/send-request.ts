import { readAnswer, UnreachableError } from "./problem-document";

/** A write that hangs longer than this counts as unanswered; the same request id makes sending again safe. */
const PATIENCE_MS = 20_000;

/**
 * Sends one write with its body as it stands, byte for byte: the server compares the bytes when the same
 * request id comes twice.
 *
 * @throws ProblemError for a refusal, UnreachableError when no answer of this program came
 */
export async function sendRequest(method: string, path: string, rawBody: string): Promise<unknown> {
  let response: Response;
  try {
    response = await fetch(path, {
      method,
      headers: { "content-type": "application/json", accept: "application/json" },
      body: rawBody,
      cache: "no-store",
      signal: AbortSignal.timeout(PATIENCE_MS),
    });
  } catch (error) {
    throw new UnreachableError(error);
  }
  return readAnswer(response);
}
