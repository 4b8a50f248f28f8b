"use client";

import { useCallback, useMemo, useRef, useState } from "react";
import type { Endpoint } from "@/lib/core/endpoint";
import type { ProblemDocument } from "@/lib/core/errors";
import { fillPath, type AddressOf, type InputOf, type OutputOf } from "./fetch-endpoint";
import { fieldErrorsOf, ProblemError, UnreachableError } from "./problem-document";
import { requestToSend, type Sent, type SendOptions } from "./request-to-send";
import { sendRequest } from "./send-request";

type OmitEach<T, Key extends PropertyKey> = T extends unknown ? Omit<T, Key> : never;

/** What a form hands over: the contract's input without the request id, which the hook makes. */
export type CommandInput<E extends Endpoint> = OmitEach<InputOf<E>, "requestId">;

/**
 * How a write ended.
 * - `done`: the server's receipt.
 * - `refused`: a problem document; nothing was saved.
 * - `unreachable`: no answer came; it may or may not have been saved. Sending again is safe, because the hook
 *   keeps the request id until an answer came.
 */
export type CommandResult<E extends Endpoint> =
  | { kind: "done"; receipt: OutputOf<E>; requestId: string }
  | { kind: "refused"; problem: ProblemDocument; requestId: string }
  | { kind: "unreachable"; requestId: string };

export type Command<E extends Endpoint> = {
  send(
    input: CommandInput<E>,
    options?: SendOptions<keyof CommandInput<E> & string>,
  ): Promise<CommandResult<E>>;
  pending: boolean;
  /** The last refusal, until the next send or reset. */
  problem: ProblemDocument | null;
  /** No answer came to the last send. */
  unreachable: boolean;
  /** The refusal's sentences by field: "readings.0.grossMilligrams". */
  fieldErrors: Readonly<Record<string, string>>;
  reset(): void;
};

/**
 * Sends a client's write to a contract's endpoint.
 *
 * @example
 * const save = useCommand(createPointEndpoint);
 * const result = await save.send({ name, kind });
 * if (result.kind === "done") router.push(`/points/${result.receipt.id}`);
 */
export function useCommand<E extends Endpoint>(endpoint: E | AddressOf<E>): Command<E> {
  const { method, path: template } = endpoint;
  const [state, setState] = useState<{
    pending: boolean;
    problem: ProblemDocument | null;
    unreachable: boolean;
  }>({ pending: false, problem: null, unreachable: false });
  const unanswered = useRef<Sent | null>(null);

  const send = useCallback(
    async (input: CommandInput<E>, options: SendOptions = {}): Promise<CommandResult<E>> => {
      const { path, rest } = fillPath(template, input);
      const sent = requestToSend(path, rest, options, unanswered.current);
      const { requestId } = sent;
      setState({ pending: true, problem: null, unreachable: false });
      try {
        const receipt = await sendRequest(method, path, sent.rawBody);
        unanswered.current = null;
        setState({ pending: false, problem: null, unreachable: false });
        return { kind: "done", receipt: receipt as OutputOf<E>, requestId };
      } catch (error) {
        if (error instanceof ProblemError) {
          // Another refusal (signed out, busy) does not tell what became of a sending before it.
          if (error.problem.code === "request-id-reused") unanswered.current = null;
          setState({ pending: false, problem: error.problem, unreachable: false });
          return { kind: "refused", problem: error.problem, requestId };
        }
        unanswered.current = sent;
        setState({ pending: false, problem: null, unreachable: true });
        if (error instanceof UnreachableError) return { kind: "unreachable", requestId };
        throw error;
      }
    },
    [method, template],
  );

  const reset = useCallback(
    () => setState({ pending: false, problem: null, unreachable: false }),
    [],
  );
  const fieldErrors = useMemo(() => fieldErrorsOf(state.problem), [state.problem]);
  return { send, reset, fieldErrors, ...state };
}
