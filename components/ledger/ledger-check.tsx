"use client";

import { useState } from "react";
import { useForm } from "react-hook-form";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { Figure } from "@/components/ui/figure";
import { Notice } from "@/components/ui/notice";
import { TextField } from "@/components/ui/text-field";
import { Ticket } from "@/components/ui/ticket";
import { dayOf, formatClock, formatDay } from "@/lib/core/time";
import type { LastVerification, verifyEndpoint } from "@/lib/ledger/contract";

type Props = {
  initial: LastVerification;
  head: { entryId: number; hash: string };
  timeZone: string;
};

const HASH = /^[0-9a-f]{64}$/i;

/** Where the ledger stands, what its last verification found, and a button to verify again. */
export function LedgerCheck({ initial, head, timeZone }: Props) {
  const [last, setLast] = useState(initial);
  const verify = useCommand<typeof verifyEndpoint>({
    method: "POST",
    path: "/api/ledger/verifications",
  });
  const form = useForm({ defaultValues: { entry: "", hash: "" } });
  const { errors } = form.formState;

  const submit = form.handleSubmit(async ({ entry, hash }) => {
    const noted = entry.trim() !== "" && hash.trim() !== "";
    const result = await verify.send({
      entryId: noted ? Number(entry) : null,
      hash: noted ? hash.trim() : null,
    });
    if (result.kind === "done") setLast(result.receipt);
  });

  return (
    <form onSubmit={(event) => void submit(event)} className="grid max-w-3xl gap-5" noValidate>
      <Outcome last={last} timeZone={timeZone} />
      <Ticket
        label="Where the ledger stands"
        stub={<Figure label="Last entry" value={head.entryId === 0 ? "none yet" : head.entryId} />}
      >
        <div className="text-xs font-bold text-soft">Its fingerprint (SHA-256)</div>
        <div className="font-mono text-sm break-all">{head.hash || "none yet"}</div>
      </Ticket>
      <fieldset className="grid gap-4">
        <legend className="mb-1 text-lg font-bold">Compare with a note (may stay empty)</legend>
        <p className="text-soft">
          The chain alone cannot show that its end was written anew. If you noted an entry and its
          fingerprint outside the program, it is compared as well.
        </p>
        <TextField
          label="Entry"
          inputMode="numeric"
          error={errors.entry?.message}
          {...form.register("entry", {
            validate: (value, all) =>
              value.trim() === ""
                ? all.hash.trim() === "" || "Give the entry that the fingerprint belongs to."
                : /^[1-9]\d*$/.test(value.trim()) || "The number of an entry, such as 1204.",
          })}
        />
        <TextField
          label="Fingerprint"
          autoComplete="off"
          spellCheck={false}
          error={errors.hash?.message}
          {...form.register("hash", {
            validate: (value, all) =>
              value.trim() === ""
                ? all.entry.trim() === "" || "Give the fingerprint that you noted for the entry."
                : HASH.test(value.trim()) || "A fingerprint has 64 characters, 0 to 9 and a to f.",
          })}
        />
      </fieldset>
      {verify.problem ? (
        <Notice tone="bad" live="alert">
          {verify.problem.detail}
        </Notice>
      ) : null}
      {verify.unreachable ? (
        <Notice tone="warn" live="alert">
          No answer came. Nothing was changed; try again.
        </Notice>
      ) : null}
      <div>
        <Button type="submit" busy={verify.pending}>
          {verify.pending ? "Verifying…" : "Verify every entry now"}
        </Button>
      </div>
    </form>
  );
}

function Outcome({ last, timeZone }: { last: LastVerification; timeZone: string }) {
  if (last.at === null) {
    return (
      <Notice tone="info" title="Not verified yet">
        Verify it once to see whether everything adds up.
      </Notice>
    );
  }
  const when = `${formatDay(dayOf(last.at, timeZone))}, ${formatClock(last.at, timeZone)}`;
  if (last.result === null) {
    return (
      <Notice tone="warn" title="The last verification did not come to an end">
        It stopped on {when}. Verify again; if it stops again, the log says why.
      </Notice>
    );
  }
  const { ok, badEntry, problem, entries, lines } = last.result;
  if (ok) {
    return (
      <Notice tone="ok" title="Every entry is right" live="status">
        {entries} entries with {lines} lines, read on {when}: each sums to zero, and every balance
        and total is what its lines say.
      </Notice>
    );
  }
  return (
    <Notice
      tone="bad"
      title={badEntry === null ? "A stored figure is wrong" : `Entry ${badEntry} is wrong`}
      live="alert"
    >
      {problem}. Found on {when}. Stop exporting figures, keep the database file as it is, and
      compare with the last backup.
    </Notice>
  );
}
