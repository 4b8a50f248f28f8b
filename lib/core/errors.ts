/**
 * What can go wrong, as one closed list of codes. Commands throw {@link AppError}; throwing rolls back.
 * Only lib/http turns a code into a status and a problem document; only messages.ts turns it into words.
 */

export const ERROR_STATUS = {
  "signed-out": 401,
  "session-ended": 401,
  "wrong-sign-in": 401,
  "sign-in-slowed": 429,
  forbidden: 403,
  "cross-origin": 403,
  "not-found": 404,
  "method-not-allowed": 405,
  "unknown-code": 404,
  "too-large": 413,
  "not-json": 415,
  "malformed-json": 400,
  invalid: 422,
  "request-id-reused": 409,
  "bag-already-weighed": 409,
  "other-helper": 409,
  "not-a-bag": 422,
  "bag-already-sorted": 409,
  "bag-not-weighed": 409,
  "label-in-use": 409,
  "bag-wrong-state": 409,
  "point-built-in": 409,
  "scale-step": 422,
  "scale-interval": 422,
  "scale-max": 422,
  "scale-intervals": 422,
  "colour-order": 409,
  "tare-above-gross": 422,
  "above-max": 422,
  "not-a-step": 422,
  "net-zero": 422,
  "future-time": 422,
  "too-long-ago": 422,
  "one-kind-needs-material": 422,
  "unknown-point": 422,
  "unknown-scale": 422,
  "unknown-container": 422,
  "unknown-colour": 422,
  "unknown-reason": 422,
  "undo-too-late": 409,
  "undo-not-yours": 403,
  "undo-used-since": 409,
  "undone-already": 409,
  "corrected-already": 409,
  "undo-of-correction": 409,
  "not-for-review": 409,
  "piles-empty": 422,
  "lot-closed": 409,
  "lot-other-material": 422,
  "bag-in-other-session": 409,
  "draft-overtaken": 409,
  "draft-over": 409,
  "no-bags": 422,
  "sum-beyond-tolerance": 422,
  "sum-far-above-net": 422,
  "unknown-lot": 422,
  "lot-counted-meanwhile": 409,
  "lot-moved-meanwhile": 409,
  "lot-holds-less": 409,
  "lot-empty": 409,
  "lot-closed-already": 409,
  "lots-differ": 422,
  "same-lot": 422,
  "lot-twice": 422,
  "lot-identified-already": 409,
  "container-taken": 409,
  "count-zero": 422,
  "weighed-back-more": 422,
  "stated-in-correction": 422,
  "step-polymers-differ": 422,
  "step-forms-differ": 422,
  "step-output-kind": 422,
  "step-output-colour": 422,
  "step-beyond-tolerance": 422,
  "step-output-above-input": 422,
  "name-in-use": 409,
  "email-in-use": 409,
  "joined-already": 409,
  "link-expired": 410,
  "password-too-short": 422,
  "password-too-long": 422,
  "password-too-common": 422,
  "password-wrong": 422,
  "last-coordinator": 409,
  "own-role": 409,
  "ledger-short": 409,
  "ledger-unbalanced": 500,
  "ledger-correction-of-reversal": 409,
  "opening-refused": 409,
  "zone-fixed": 409,
  "period-invalid": 422,
  "verify-under-way": 409,
  "scheme-exists": 409,
  "unknown-check-weight": 422,
  "check-weight-too-heavy": 422,
  "check-failed-twice": 409,
  "scale-cleared-already": 409,
  "unknown-destination": 422,
  "removal-above-book": 422,
  "removal-nothing-there": 409,
  "removal-lot-twice": 422,
  "removal-taken-back": 409,
  "removal-has-receipt": 409,
  "receipt-not-needed": 409,
  "receipt-exists": 409,
  "receipt-number-used": 409,
  "receipt-too-early": 422,
  "piece-of-another-method": 422,
  "tool-of-another-piece": 422,
  "never-heated": 422,
  "not-in-catalogue": 409,
  "plan-lacks": 422,
  "plan-colour": 422,
  "shot-too-large": 422,
  "shot-too-small": 422,
  "sheet-too-large": 422,
  "run-not-planned": 409,
  "run-reserved": 409,
  "nothing-free": 409,
  "nothing-lacks": 409,
  "nothing-reserved": 409,
  "lot-not-for-run": 422,
  "lot-not-free": 409,
  "lot-reserved": 409,
  "photo-not-a-picture": 422,
  "photo-heic": 422,
  "photo-too-large": 413,
  "photo-empty": 422,
  "photos-too-many": 409,
  "photo-subject-unknown": 422,
  "photo-link-expired": 403,
  "photo-link-refused": 403,
  "photo-link-used": 409,
  "photo-cut-off": 400,
  "photo-cancelled": 400,
  "photo-unfinished": 502,
  "photo-storage-down": 503,
  busy: 503,
  "database-unavailable": 503,
  internal: 500,
} as const satisfies Record<string, number>;

export type ErrorCode = keyof typeof ERROR_STATUS;
export type ErrorDetail = Readonly<Record<string, string | number | null>>;

/** A refusal with a code, the values its sentence needs, and, for a form, the field it belongs to. */
export class AppError extends Error {
  readonly code: ErrorCode;
  readonly detail: ErrorDetail;
  /** Path of the input that is wrong, as in a zod issue: ["readings", 0, "gross"]. */
  readonly path: readonly (string | number)[];

  constructor(code: ErrorCode, detail: ErrorDetail = {}, path: readonly (string | number)[] = []) {
    super(code);
    this.name = "AppError";
    this.code = code;
    this.detail = detail;
    this.path = path;
  }
}

/** One refused field of a problem document's `errors` list. */
export type FieldProblem = { path: readonly (string | number)[]; code: string; detail: string };

/** The body of every refusal: RFC 9457 with our extensions `code`, `requestId`, `detailValues`, `errors`. */
export type ProblemDocument = {
  type: string;
  title: string;
  status: number;
  detail: string;
  code: ErrorCode;
  requestId: string;
  values: ErrorDetail;
  errors?: readonly FieldProblem[];
};
