"use client";

import { Skeleton } from "@/components/ui/skeleton";
import { readCode, readScan, formatCode } from "@/lib/core/bag-code";
import { ProblemError } from "@/components/forms/problem-document";
import type { Instant } from "@/lib/core/time";
import { bagAge } from "./bag-words";
import { CODE_SENTENCES } from "./read-form";
import type { ScannedQuery } from "./use-scanned";

type Props = {
  text: string;
  onText(text: string): void;
  /** Enter, which a hand scanner sends after the code. */
  onEnter(text: string): void;
  scanned: ScannedQuery;
  /** A refusal's sentence. */
  error: string | undefined;
  zone: string;
  /** The bag has no tag. */
  onSpare(): void;
};

/** The tag's code, always there to type into, and at once what it stands for. */
export function CodeArea({ text, onText, onEnter, scanned, error, zone, onSpare }: Props) {
  const wrong = error ?? codeSentence(text) ?? unknownSentence(scanned.error);
  const bag = scanned.data?.kind === "bag" ? scanned.data : null;
  return (
    <div>
      <div className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-3">
        <div className="min-w-0">
          <label htmlFor="weigh-in-code" className="block text-sm font-bold text-soft">
            Bag
          </label>
          <input
            id="weigh-in-code"
            name="code"
            type="text"
            value={text}
            placeholder="Tag code"
            autoComplete="off"
            autoCapitalize="characters"
            autoCorrect="off"
            spellCheck={false}
            enterKeyHint="next"
            onChange={(event) => onText(event.target.value)}
            onFocus={(event) => event.target.select()}
            onKeyDown={(event) => {
              if (event.key !== "Enter") return;
              // A hand scanner ends with Enter: the next field, not the whole form.
              event.preventDefault();
              onEnter(event.currentTarget.value);
            }}
            aria-invalid={wrong ? true : undefined}
            aria-describedby="weigh-in-code-said"
            className="min-h-11 w-36 min-w-0 rounded-control wide:w-44 bg-transparent font-mono text-xl font-bold tracking-tighter uppercase placeholder:font-body placeholder:text-lg placeholder:font-normal placeholder:tracking-normal placeholder:text-soft placeholder:normal-case aria-invalid:text-bad"
          />
        </div>
        <div className="min-w-0 text-right">
          {bag ? (
            <>
              <div className="text-sm font-bold text-soft">From</div>
              <div className="leading-5 font-bold break-words hyphens-auto">
                {bag.point?.name ?? "No point yet"}
              </div>
              <div className="text-sm text-soft">
                {bagAge(bag.state, bag.since as Instant, scanned.dataUpdatedAt as Instant, zone)}
              </div>
            </>
          ) : scanned.isLoading ? (
            <Skeleton shape="lines" count={2} label="Looking up the bag" />
          ) : text.trim() === "" ? (
            <button
              type="button"
              onClick={onSpare}
              className="link inline-flex min-h-11 items-center text-right text-sm/5 font-bold"
            >
              No tag? Give it a spare one
            </button>
          ) : null}
        </div>
      </div>
      <p id="weigh-in-code-said" aria-live="polite" className="text-sm">
        {wrong ? <span className="font-bold text-bad">{wrong}</span> : null}
        {!wrong && scanned.data?.kind === "other" ? (
          <span className="font-bold text-bad">
            {formatCode(scanned.data.code)} is on the label of a {scanned.data.label}. Scan the bag.
          </span>
        ) : null}
        {!wrong && scanned.isError ? (
          <span className="text-soft">
            No answer from the server: weigh on, the bag is looked up when the ticket is sent.
          </span>
        ) : null}
      </p>
    </div>
  );
}

/** A wrong check character is told at once; a code that is still being typed is left alone. */
function codeSentence(text: string): string | undefined {
  if (text.trim() === "" || readScan(text) !== null || /^https?:/i.test(text)) return undefined;
  const reading = readCode(text);
  if (reading.ok) return undefined;
  return reading.problem === "wrong-length" && text.replace(/[\s-]/g, "").length < 8
    ? undefined
    : reading.problem === "wrong-length"
      ? CODE_SENTENCES.short
      : CODE_SENTENCES.wrong;
}

function unknownSentence(error: Error | null): string | undefined {
  return error instanceof ProblemError ? error.problem.detail : undefined;
}
