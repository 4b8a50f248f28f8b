import type * as z from "zod";
import type { Endpoint } from "@/lib/core/endpoint";
import { readAnswer, UnreachableError } from "./problem-document";

export type InputOf<E extends Endpoint> = z.input<E["input"]>;
export type OutputOf<E extends Endpoint> = z.output<E["output"]>;

/**
 * Where an endpoint is. A contract's endpoint object is one; a page that must stay small passes method and
 * path alone (and names the contract's type), so that no schema travels to the browser.
 */
export type AddressOf<E extends Endpoint> = Pick<E, "method" | "path">;

type Values = Readonly<Record<string, unknown>>;

/**
 * Fills the path's parameters from the input.
 *
 * @returns the path and what is left for query string or body
 */
export function fillPath(path: string, input: Values): { path: string; rest: Values } {
  const used = new Set<string>();
  const filled = path.replace(/\{([^}]+)\}/g, (_, name: string) => {
    const value = input[name];
    if (typeof value !== "string" && typeof value !== "number") {
      throw new TypeError(`The path ${path} needs ${name}.`);
    }
    used.add(name);
    return encodeURIComponent(String(value));
  });
  return {
    path: filled,
    rest: Object.fromEntries(Object.entries(input).filter(([name]) => !used.has(name))),
  };
}

/** `{a: 1, b: ["x", "y"], c: undefined}` as `?a=1&b=x&b=y`. */
function queryString(values: Values): string {
  const query = new URLSearchParams();
  for (const [name, value] of Object.entries(values)) {
    for (const item of Array.isArray(value) ? value : [value]) {
      if (item !== undefined && item !== null) query.append(name, String(item));
    }
  }
  const text = query.toString();
  return text === "" ? "" : `?${text}`;
}

/** The address and query string that {@link fetchEndpoint} reads: for links and downloads. */
export function endpointUrl<E extends Endpoint>(
  endpoint: E | AddressOf<E>,
  input: InputOf<E>,
): string {
  const { path, rest } = fillPath(endpoint.path, input as Values);
  return path + queryString(rest);
}

/**
 * Reads from a GET handler. Made for TanStack Query: `queryFn: ({ signal }) => fetchEndpoint(e, {}, signal)`.
 *
 * @throws ProblemError for a refusal, UnreachableError when no answer of this program came
 */
export async function fetchEndpoint<E extends Endpoint>(
  endpoint: E | AddressOf<E>,
  input: InputOf<E>,
  signal?: AbortSignal,
): Promise<OutputOf<E>> {
  let response: Response;
  try {
    response = await fetch(endpointUrl(endpoint, input), {
      headers: { accept: "application/json" },
      cache: "no-store",
      signal,
    });
  } catch (error) {
    if (signal?.aborted) throw error;
    throw new UnreachableError(error);
  }
  return (await readAnswer(response)) as OutputOf<E>;
}
