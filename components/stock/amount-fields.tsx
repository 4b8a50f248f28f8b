"use client";

import { CheckField } from "@/components/ui/check-field";
import { ChoiceTiles } from "@/components/ui/choice-tiles";
import { formatKg } from "@/lib/core/mass";
import type { AmountInput } from "@/lib/stock/contract/weighed";
import type { DeskLists } from "../weighing/use-desk-lists";
import { BinWeighing } from "./bin-weighing";
import { sentWeighing, type WeighingValue } from "./weighing-value";

export type AmountValue = { how: "all" | "taken"; emptied: boolean; weighing: WeighingValue };

/** As the endpoints take it; null while the weight cannot be read. */
export function sentAmount(value: AmountValue, lists: DeskLists): AmountInput | null {
  if (value.how === "all") return { how: "all" };
  const weighed = sentWeighing(value.weighing, lists.containers);
  return weighed && { how: "taken", all: value.emptied, ...weighed };
}

type Props = {
  value: AmountValue;
  onValue: (value: AmountValue) => void;
  heldGrams: number;
  lists: DeskLists;
  asked: boolean;
  errors: Readonly<Record<string, string>>;
  /** Read aloud and shown above: "How much went in?" */
  legend: string;
};

/** How much is taken of a lot: all that the book holds, or what the scale shows. */
export function AmountFields({ value, onValue, heldGrams, lists, asked, errors, legend }: Props) {
  return (
    <div className="grid gap-4">
      <ChoiceTiles
        legend={legend}
        name="how-much"
        columns={2}
        value={value.how}
        onChoose={(how) => onValue({ ...value, how: how as AmountValue["how"] })}
        choices={[
          { value: "all", label: `All of it, ${formatKg(heldGrams)} kg by the book` },
          { value: "taken", label: "Weigh it" },
        ]}
      />
      {value.how === "taken" ? (
        <>
          <BinWeighing
            value={value.weighing}
            onValue={(weighing) => onValue({ ...value, weighing })}
            lists={lists}
            asked={asked}
            errors={errors}
          />
          <CheckField
            label="The bin is empty now"
            hint="Then this weighing is a count of it as well."
            checked={value.emptied}
            onChange={(event) => onValue({ ...value, emptied: event.target.checked })}
          />
        </>
      ) : null}
    </div>
  );
}
