/**
 * An endpoint object: one description for form, handler, offline queue and API description.
 * Contracts make them; lib/http serves them; components/forms sends them.
 */
import type * as z from "zod";
import type { Permission } from "./permissions";

export type Method = "GET" | "POST" | "PUT" | "PATCH" | "DELETE";

export type Endpoint<Input extends z.ZodType = z.ZodType, Output extends z.ZodType = z.ZodType> = {
  method: Method;
  /** Path with parameters in braces: `/api/bags/{code}`. */
  path: `/api/${string}`;
  summary: string;
  /** null: anybody, also signed out. */
  permission: Permission | null;
  /** Body for writes; query string and path parameters for GET. */
  input: Input;
  output: Output;
  /** Content type of a streamed answer; JSON where it is missing. */
  produces?: string;
};

/** Keeps the literal types of a contract's endpoint. */
export function endpoint<Input extends z.ZodType, Output extends z.ZodType>(
  definition: Endpoint<Input, Output>,
): Endpoint<Input, Output> {
  return definition;
}
