/**
 * Invariant: whatever the upload's client throws or reports becomes one of our own codes. Its messages name
 * the storage's vendor and its causes hold signed addresses, so neither is ever shown or logged.
 *
 * What is read of an error was observed: refusals of our own handler carry the problem document as `cause`; a
 * refused PUT says "XHR failed 403 ..."; a PUT that broke off has no text of its own; an answer with `error` in
 * it has that as `data`; storage that cannot be reached fails as INTERNAL_CLIENT_ERROR.
 */
import { ERROR_STATUS, type ErrorCode, type ErrorDetail } from "@/lib/core/errors";

export type UploadFailure = { code: ErrorCode; values: ErrorDetail };

type Loose = Readonly<Record<string, unknown>>;

const asRecord = (value: unknown): Loose | null =>
  typeof value === "object" && value !== null ? (value as Loose) : null;

const isCode = (value: unknown): value is ErrorCode =>
  typeof value === "string" && Object.hasOwn(ERROR_STATUS, value);

const failure = (code: ErrorCode, values: ErrorDetail = {}): UploadFailure => ({ code, values });

const BY_STATUS: Readonly<Record<number, ErrorCode>> = {
  400: "photo-cut-off",
  401: "photo-link-refused",
  403: "photo-link-expired",
  404: "photo-link-refused",
  409: "photo-link-used",
  413: "photo-too-large",
};

/** Plain values only, whatever a problem document may hold. */
function detailOf(values: unknown): ErrorDetail {
  const entries = Object.entries(asRecord(values) ?? {}).filter(
    (entry): entry is [string, string | number | null] =>
      entry[1] === null || typeof entry[1] === "string" || typeof entry[1] === "number",
  );
  return Object.fromEntries(entries);
}

/**
 * Our code for a failed upload.
 *
 * @param error what the client of the storage's kit threw, or handed to its error callback
 */
export function uploadFailure(error: unknown): UploadFailure {
  const thrown = asRecord(error);
  if (!thrown) return failure("photo-unfinished");
  if (thrown._tag === "UploadAborted" || thrown.name === "AbortError") {
    return failure("photo-cancelled");
  }
  const problem = asRecord(thrown.cause);
  if (problem && isCode(problem.code)) return failure(problem.code, detailOf(problem.values));
  const message = typeof thrown.message === "string" ? thrown.message : "";
  const status = /^XHR failed (\d{3})\b/.exec(message)?.[1];
  if (status) {
    return failure(
      BY_STATUS[Number(status)] ??
        (Number(status) >= 500 ? "photo-storage-down" : "photo-unfinished"),
    );
  }
  if (thrown.code === "UPLOAD_FAILED") {
    return failure(thrown.data === undefined ? "photo-cut-off" : "photo-unfinished");
  }
  // The program itself was asked first; when that went well, it is the storage that cannot be reached.
  if (message.startsWith("Failed to report event") || message.startsWith("Failed to parse")) {
    return failure("photo-cut-off");
  }
  // The hook wraps a request that did not get through; without the hook it comes as it is.
  if (thrown.code === "INTERNAL_CLIENT_ERROR" || thrown._tag === "FetchError") {
    return failure("photo-storage-down");
  }
  return failure("photo-unfinished");
}

/**
 * Our code for an answer of the completion, which says by itself why a picture was not kept.
 *
 * @param reason `serverData.reason`
 */
export function completionFailure(reason: string): UploadFailure {
  return failure(isCode(reason) ? reason : "photo-unfinished");
}

const PASSING: ReadonlySet<ErrorCode> = new Set<ErrorCode>([
  "photo-link-expired",
  "photo-link-refused",
  "photo-link-used",
  "photo-cut-off",
  "photo-cancelled",
  "photo-unfinished",
  "photo-storage-down",
  "busy",
  "internal",
]);

/** Can the same picture go through when it is sent once more? */
export function mayRetry(code: ErrorCode): boolean {
  return PASSING.has(code);
}
