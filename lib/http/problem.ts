/** Refusals as RFC 9457 problem documents. Only here does a code become a status. */
import type * as z from "zod";
import {
  AppError,
  ERROR_STATUS,
  type ErrorCode,
  type ErrorDetail,
  type FieldProblem,
  type ProblemDocument,
} from "@/lib/core/errors";
import { fieldSentence, sentence } from "@/lib/core/messages";

/** Input that the contract refuses; carries what is wrong with each field. */
export class InvalidInput extends AppError {
  readonly errors: readonly FieldProblem[];
  constructor(issues: readonly z.core.$ZodIssue[]) {
    super("invalid");
    this.errors = issues.map(fieldProblem);
  }
}

/** Our own codes are the messages of a contract's checks: "empty", "not-a-day". */
const OWN_CODE = /^[a-z][a-z-]*$/;

function fieldProblem(issue: z.core.$ZodIssue): FieldProblem {
  const code = OWN_CODE.test(issue.message) ? issue.message : issue.code;
  return {
    path: issue.path.map((step) => (typeof step === "symbol" ? String(step) : step)),
    code,
    detail: fieldSentence(code),
  };
}

/** SQLite's result codes that say that the file itself cannot be used, not that a statement is wrong. */
const FILE_TROUBLE = /^SQLITE_(CANTOPEN|IOERR|CORRUPT|NOTADB|FULL|READONLY|PERM|AUTH|BUSY|LOCKED)/;

/** Any error as one that may be shown; what is not ours becomes `internal`. */
export function asAppError(error: unknown, requestId: string): AppError {
  if (error instanceof AppError) return error;
  if (error instanceof Error && "code" in error && FILE_TROUBLE.test(String(error.code))) {
    return new AppError("database-unavailable");
  }
  return new AppError("internal", { requestId });
}

function title(code: ErrorCode): string {
  const words = code.replaceAll("-", " ");
  return words.charAt(0).toUpperCase() + words.slice(1);
}

/** The problem document of a refusal (RFC 9457, with our extensions). */
export function problemDocument(error: AppError, requestId: string): ProblemDocument {
  const detail = sentence(error.code, error.detail);
  const document: ProblemDocument = {
    type: `urn:bismar:problem:${error.code}`,
    title: title(error.code),
    status: ERROR_STATUS[error.code],
    detail,
    code: error.code,
    requestId,
    values: error.detail,
  };
  if (error instanceof InvalidInput) return { ...document, errors: error.errors };
  if (error.path.length > 0) {
    return { ...document, errors: [{ path: error.path, code: error.code, detail }] };
  }
  return document;
}

/** Seconds after which trying again makes sense, for the Retry-After header; null where it never does. */
export function retryAfter(code: ErrorCode, detail: ErrorDetail): string | null {
  if (typeof detail.seconds === "number") return String(detail.seconds);
  return ERROR_STATUS[code] === 503 ? "2" : null;
}
