"use client";

import Link from "next/link";
import { useState, type SubmitEvent } from "react";
import { QueryProvider } from "@/components/forms/query-provider";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { SelectField } from "@/components/ui/select-field";
import { TextField } from "@/components/ui/text-field";
import { formatKg } from "@/lib/core/mass";
import {
  FORM_NAMES,
  FORMS,
  KIND_NAMES,
  KINDS,
  POLYMER_ANSWERS,
  POLYMER_NAMES,
  WASH_NAMES,
  WASH_STATES,
  type Form,
  type Kind,
  type PolymerAnswer,
  type WashState,
} from "@/lib/core/plastics";
import type { CountReceipt, openStockEndpoint } from "@/lib/stock/contract/counts";
import { OPENING } from "./addresses";
import { BinWeighing } from "./bin-weighing";
import { RefusalNotice } from "./refusal-notice";
import { useBinDesk } from "./use-bin-desk";
import { firstWeighing, sentWeighing } from "./weighing-value";

function Fields() {
  const { lists, scaleId } = useBinDesk();
  const open = useCommand<typeof openStockEndpoint>(OPENING);
  const [polymer, setPolymer] = useState<PolymerAnswer | "">("");
  const [kind, setKind] = useState<Kind | "">("");
  const [colourCode, setColour] = useState("");
  const [form, setForm] = useState<Form>("whole");
  const [wash, setWash] = useState<WashState>("as-received");
  const [place, setPlace] = useState("");
  const [sheet, setSheet] = useState("");
  const [typed, setTyped] = useState(firstWeighing(""));
  const [asked, setAsked] = useState(false);
  const [done, setDone] = useState<CountReceipt | null>(null);
  const weighing = { ...typed, scaleId: typed.scaleId || scaleId };

  async function send(event: SubmitEvent) {
    event.preventDefault();
    setAsked(true);
    const sent = sentWeighing(weighing, lists.containers);
    if (polymer === "" || kind === "" || colourCode === "" || sheet.trim() === "" || !sent) return;
    const result = await open.send(
      { ...sent, polymer, kind, colourCode, form, wash, place, sheet, occurredAt: Date.now() },
      { pressedAt: "occurredAt" },
    );
    if (result.kind !== "done") return;
    setDone(result.receipt);
    setAsked(false);
    setTyped(firstWeighing(weighing.scaleId));
    setPlace("");
  }

  const missing = (value: string, said: string) => (asked && value === "" ? said : undefined);
  return (
    <form onSubmit={(event) => void send(event)} className="grid gap-5 rail:max-w-xl">
      {done ? (
        <Notice
          tone="ok"
          live="status"
          title={`${formatKg(done.countedGrams)} kg stand in lot ${done.number}.`}
          action={
            <Link
              href={`/stock/lots/${done.number}`}
              className="link inline-flex min-h-11 items-center font-bold"
            >
              Open lot {done.number}
            </Link>
          }
        />
      ) : null}
      <div className="grid grid-cols-2 gap-3">
        <SelectField
          label="Polymer"
          placeholder="Choose"
          value={polymer}
          onChange={(event) => setPolymer(event.target.value as PolymerAnswer | "")}
          options={POLYMER_ANSWERS.map((value) => ({ value, label: POLYMER_NAMES[value].name }))}
          error={missing(polymer, "Choose the polymer.")}
        />
        <SelectField
          label="Colour"
          placeholder="Choose"
          value={colourCode}
          onChange={(event) => setColour(event.target.value)}
          options={lists.colours.map(({ code, name }) => ({ value: code, label: name }))}
          error={missing(colourCode, "Choose the colour.") ?? open.fieldErrors.colourCode}
        />
        <SelectField
          label="Kind"
          placeholder="Choose"
          value={kind}
          onChange={(event) => setKind(event.target.value as Kind | "")}
          options={KINDS.map((value) => ({ value, label: KIND_NAMES[value] }))}
          error={missing(kind, "Choose the kind.")}
        />
        <SelectField
          label="Form"
          value={form}
          onChange={(event) => setForm(event.target.value as Form)}
          options={FORMS.map((value) => ({ value, label: FORM_NAMES[value] }))}
        />
        <SelectField
          label="Washed?"
          value={wash}
          onChange={(event) => setWash(event.target.value as WashState)}
          options={WASH_STATES.map((value) => ({ value, label: WASH_NAMES[value] }))}
        />
        <TextField
          label="Place"
          placeholder="Rack B, shelf 2"
          maxLength={80}
          value={place}
          onChange={(event) => setPlace(event.target.value)}
        />
      </div>
      <BinWeighing
        value={weighing}
        onValue={setTyped}
        lists={lists}
        asked={asked}
        errors={open.fieldErrors}
        label="In the container"
      />
      <TextField
        label="Signed count sheet"
        hint="Its number, and who signed it."
        placeholder="Sheet 3, signed W. Tidewell"
        maxLength={120}
        value={sheet}
        onChange={(event) => setSheet(event.target.value)}
        error={
          missing(sheet.trim(), "Opening stock needs a signed count sheet.") ??
          open.fieldErrors.sheet
        }
      />
      <RefusalNotice command={open} />
      <Button type="submit" busy={open.pending}>
        Enter this container
      </Button>
    </form>
  );
}

/** Opening stock, one container after another, each a lot of its own. */
export function OpeningForm() {
  return (
    <QueryProvider>
      <Fields />
    </QueryProvider>
  );
}
