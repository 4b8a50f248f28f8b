import type { ProblemDocument } from "@/lib/core/errors";
import { captureSentence } from "@/lib/core/capture-messages";

/** The server answered with a refusal. */
export class ProblemError extends Error {
  readonly problem: ProblemDocument;

  constructor(problem: ProblemDocument) {
    super(problem.detail);
    this.name = "ProblemError";
    this.problem = problem;
  }
}

/** No answer of this program arrived: no signal, server gone, or something in between answered. */
export class UnreachableError extends Error {
  constructor(cause?: unknown) {
    super("The server did not answer.", { cause });
    this.name = "UnreachableError";
  }
}

/** What a page says when no answer came; what was or was not saved shows itself otherwise. */
export const UNREACHABLE_SENTENCE =
  "The server did not answer. What you typed is still here, so try again in a moment.";

const isJson = (response: Response): boolean =>
  /^application\/(problem\+)?json\b/i.test(response.headers.get("content-type") ?? "");

/**
 * Reads an answer of the program's own handlers.
 *
 * A network's sign-in page or a proxy's error page is no answer: it counts as unreachable, or the offline
 * queue would take it for a receipt.
 *
 * @throws ProblemError for a refusal, UnreachableError when the answer is none of ours
 */
export async function readAnswer(response: Response): Promise<unknown> {
  if (!isJson(response)) throw new UnreachableError(`status ${response.status}, not JSON`);
  let body: unknown;
  try {
    body = await response.json();
  } catch (error) {
    throw new UnreachableError(error);
  }
  if (response.ok) return body;
  throw new ProblemError(asProblem(body, response.status));
}

/** A refusal as it stands, or, should the body lack what a problem document holds, an `internal` one. */
function asProblem(body: unknown, status: number): ProblemDocument {
  if (typeof body === "object" && body !== null && "code" in body && "detail" in body) {
    return body as ProblemDocument;
  }
  return {
    type: "about:blank",
    title: "Refused",
    status,
    detail: captureSentence("internal", { requestId: "(none)" }),
    code: "internal",
    requestId: "",
    values: {},
  };
}

/**
 * The sentences of a refusal by field: `readings.0.grossMilligrams` to "The scale shows steps of 5 g. …".
 * The first one of a field is kept.
 */
export function fieldErrorsOf(problem: ProblemDocument | null): Readonly<Record<string, string>> {
  const byField: Record<string, string> = {};
  for (const error of problem?.errors ?? []) {
    const field = error.path.join(".");
    byField[field] ??= error.detail;
  }
  return byField;
}
