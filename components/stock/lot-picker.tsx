"use client";

import { useQuery } from "@tanstack/react-query";
import { useCallback, useState, type SubmitEvent } from "react";
import { fetchEndpoint } from "@/components/forms/fetch-endpoint";
import { ProblemError } from "@/components/forms/problem-document";
import { CameraView } from "@/components/scanner/camera-view";
import type { Verdict } from "@/components/scanner/feedback";
import { useWedge } from "@/components/scanner/use-wedge";
import { Button } from "@/components/ui/button";
import { Icon } from "@/components/ui/icon";
import { PileSwatch } from "@/components/ui/pile-swatch";
import { TextField } from "@/components/ui/text-field";
import { readScan } from "@/lib/core/bag-code";
import { formatKg } from "@/lib/core/mass";
import type { Form, Kind, PolymerAnswer, WashState } from "@/lib/core/plastics";
import type { lotByLabelEndpoint } from "@/lib/stock/contract/lot-care";
import type { listLotsEndpoint, LotSummary } from "@/lib/stock/contract/lots";
import { pileDetail, pileName } from "@/lib/stock/rules/material-words";
import { LOT_BY_LABEL, LOTS } from "./addresses";
import { PATTERNS } from "./patterns";

type Props = {
  /** Which lots are offered; all that hold something when left out. */
  like?: Partial<{
    polymer: PolymerAnswer;
    kind: Kind;
    colourCode: string;
    form: Form;
    wash: WashState;
  }>;
  /** Lots that are not offered. */
  without: readonly number[];
  onPick: (lot: LotSummary) => void;
  legend: string;
};

/** Offered without being asked for; more are found by number or label. */
const MOST_OFFERED = 12;

async function lotByNumber(number: number): Promise<LotSummary | null> {
  const { lots } = await fetchEndpoint<typeof listLotsEndpoint>(LOTS, { number: String(number) });
  return lots[0] ?? null;
}

/** A lot by its label, its number, or from the shelf. */
export function LotPicker({ like = {}, without, onPick, legend }: Props) {
  const [text, setText] = useState("");
  const [problem, setProblem] = useState<string>();
  const [scanning, setScanning] = useState(false);
  const shelf = useQuery({
    queryKey: ["lots", "held", like],
    queryFn: ({ signal }) => fetchEndpoint<typeof listLotsEndpoint>(LOTS, like, signal),
  });
  const offered = (shelf.data?.lots ?? []).filter(({ number }) => !without.includes(number));

  const find = useCallback(
    async (typed: string) => {
      const plain = typed.trim();
      try {
        const code = readScan(plain);
        const number = /^\d{1,9}$/.test(plain)
          ? Number(plain)
          : code && (await fetchEndpoint<typeof lotByLabelEndpoint>(LOT_BY_LABEL, { code })).number;
        const lot = number ? await lotByNumber(number) : null;
        if (!lot) {
          setProblem("No lot has this number or label. Look at the label once more.");
          return;
        }
        setText("");
        setScanning(false);
        onPick(lot);
      } catch (error) {
        setProblem(
          error instanceof ProblemError
            ? error.problem.detail
            : "The server did not answer. Try again in a moment.",
        );
      }
    },
    [onPick],
  );
  const read = useCallback(
    (scanned: string): Verdict | null => {
      if (!readScan(scanned)) return "unknown";
      void find(scanned);
      return null;
    },
    [find],
  );
  useWedge(find);

  function submit(event: SubmitEvent) {
    event.preventDefault();
    event.stopPropagation();
    void find(text);
  }

  return (
    <section aria-label={legend} className="grid gap-3">
      <h3 className="text-sm font-bold text-soft">{legend}</h3>
      {scanning ? <CameraView onRead={read} onTrouble={() => setScanning(false)} /> : null}
      <form onSubmit={submit} className="flex flex-wrap items-end gap-2.5">
        <TextField
          label="Lot number or label"
          placeholder="12 or K7Q2-9F4M"
          mono
          autoComplete="off"
          enterKeyHint="go"
          value={text}
          onChange={(event) => {
            setText(event.target.value);
            setProblem(undefined);
          }}
          error={problem}
          className="min-w-0 grow basis-40"
        />
        <Button
          variant="quiet"
          aria-pressed={scanning}
          onClick={() => setScanning(!scanning)}
          className="max-wide:grow"
        >
          <Icon name="camera" />
          {scanning ? "Stop" : "Scan"}
        </Button>
        <Button
          variant="quiet"
          type="submit"
          disabled={text.trim() === ""}
          className="max-wide:grow"
        >
          Add
        </Button>
      </form>
      {offered.length > 0 ? (
        <ul className="grid gap-2 wide:grid-cols-2">
          {offered.slice(0, MOST_OFFERED).map((lot) => (
            <li key={lot.number}>
              <button
                type="button"
                onClick={() => onPick(lot)}
                className="flex min-h-14 w-full items-center gap-3 rounded-control border border-rule bg-card px-3 py-2 text-left hover:bg-well"
              >
                <PileSwatch
                  hex={lot.colourHex}
                  pattern={PATTERNS[lot.colourLook]}
                  seed={lot.number}
                  size={24}
                />
                <span className="min-w-0 grow">
                  <span className="block font-bold">
                    Lot {lot.number}: {pileName(lot.colourName, lot.polymer)}
                  </span>
                  <span className="block text-sm text-soft">{pileDetail(lot)}</span>
                </span>
                <span className="font-mono font-bold">{formatKg(lot.heldGrams)}</span>
              </button>
            </li>
          ))}
        </ul>
      ) : shelf.data ? (
        <p className="text-soft">No other lot of this kind holds anything now.</p>
      ) : null}
      {offered.length > MOST_OFFERED ? (
        <p className="text-sm text-soft">
          {offered.length - MOST_OFFERED} more are found by their number or label.
        </p>
      ) : null}
    </section>
  );
}
