"use client";

import { useRouter } from "next/navigation";
import { useState, type SubmitEvent } from "react";
import { UNANSWERED_SENTENCE } from "@/components/forms/unanswered";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/text-field";
import type { setLotPlaceEndpoint } from "@/lib/stock/contract/lots";

type Props = { number: number; place: string; mayEdit: boolean };

const ADDRESS = { method: "PUT", path: "/api/lots/{number}/place" } as const;

/** Where the lot stands, in the shed's own words. */
export function LotPlace({ number, place, mayEdit }: Props) {
  const router = useRouter();
  const save = useCommand<typeof setLotPlaceEndpoint>(ADDRESS);
  const [text, setText] = useState(place);
  const [saved, setSaved] = useState(place);

  if (!mayEdit) {
    return (
      <p className="mt-3">
        <span className="text-soft">Place</span> <strong>{place || "Not said"}</strong>
      </p>
    );
  }

  async function send(event: SubmitEvent) {
    event.preventDefault();
    const result = await save.send({ number, place: text });
    if (result.kind !== "done") return;
    setText(result.receipt.place);
    setSaved(result.receipt.place);
    router.refresh();
  }

  const changed = text.trim() !== saved;
  const problem =
    save.fieldErrors.place ??
    save.problem?.detail ??
    (save.unreachable ? UNANSWERED_SENTENCE : undefined);
  return (
    <form onSubmit={(event) => void send(event)} className="mt-4 flex items-end gap-2.5">
      <TextField
        label="Place"
        placeholder="Rack B, shelf 2"
        value={text}
        maxLength={80}
        onChange={(event) => setText(event.target.value)}
        error={problem}
        className="min-w-0 grow"
      />
      <Button type="submit" variant="quiet" disabled={!changed} busy={save.pending}>
        {changed || saved === "" ? "Save place" : "Saved"}
      </Button>
    </form>
  );
}
