"use client";

import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { Notice } from "@/components/ui/notice";
import type { FoundInput } from "@/lib/stock/contract/weighed";
import type { DeskLists } from "../weighing/use-desk-lists";
import { BinWeighing } from "./bin-weighing";
import { sentWeighing, type WeighingValue } from "./weighing-value";

export type FoundValue = { found: "" | "weighed" | "empty"; weighing: WeighingValue };

/** As the endpoints take it; null while nothing is said or the weight cannot be read. */
export function sentFound(value: FoundValue, lists: DeskLists): FoundInput | null {
  if (value.found === "empty") return { found: "empty" };
  const weighed = value.found === "weighed" ? sentWeighing(value.weighing, lists.containers) : null;
  return weighed && { found: "weighed", ...weighed };
}

type Props = {
  value: FoundValue;
  onValue: (value: FoundValue) => void;
  lists: DeskLists;
  asked: boolean;
  errors: Readonly<Record<string, string>>;
  /** The refusal's sentence: what the book holds, what was taken. */
  said: string;
};

/** The one count on the spot that is asked for where more was taken than the book holds. */
export function LeftFields({ value, onValue, lists, asked, errors, said }: Props) {
  return (
    <div className="grid gap-4">
      <Notice tone="warn" title="More than the book holds" live="alert">
        {said}
      </Notice>
      <ChoiceTiles
        legend="What is left in the bin?"
        name="left"
        columns={2}
        value={value.found}
        onChoose={(found) => onValue({ ...value, found: found as FoundValue["found"] })}
        choices={[
          { value: "empty", label: "Bin is empty" },
          { value: "weighed", label: "Weigh what is left" },
        ]}
        error={asked && value.found === "" ? "Say what is left in the bin." : undefined}
      />
      {value.found === "weighed" ? (
        <BinWeighing
          value={value.weighing}
          onValue={(weighing) => onValue({ ...value, weighing })}
          lists={lists}
          asked={asked}
          errors={errors}
          label="Left in the bin"
        />
      ) : null}
    </div>
  );
}
