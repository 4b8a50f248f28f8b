import { AppError, type ErrorCode } from "@/lib/core/errors";

/** The error that a promise is refused with; fails when it is kept. */
export async function refusedError(promise: Promise<unknown>): Promise<AppError> {
  try {
    await promise;
  } catch (error) {
    if (error instanceof AppError) return error;
    throw error;
  }
  throw new Error("it was not refused");
}

/** Its code alone. */
export async function refusedCode(promise: Promise<unknown>): Promise<ErrorCode> {
  return (await refusedError(promise)).code;
}
