"use client";

import { useState } from "react";
import { SelectField } from "@/components/ui/select-field";
import { TextField } from "@/components/ui/text-field";
import type { PointId } from "@/lib/core/ids";
import { POLYMER_ANSWERS, POLYMER_NAMES, type PolymerAnswer } from "@/lib/core/plastics";
import type { WaitingFilter } from "@/lib/sorting/contract/waiting";
import { CONDITION_NAMES, CONDITIONS, type Condition } from "@/lib/weighing/terms";
import type { DeskPoint } from "../weighing/use-desk-lists";
import { isNarrowed } from "./waiting-address";

type Props = {
  filter: WaitingFilter;
  points: readonly DeskPoint[];
  onFilter: (filter: WaitingFilter) => void;
};

/** Point, likely polymer and condition; what is left at "all" lets every bag through. */
export function WaitingFilters({ filter, points, onFilter }: Props) {
  const [words, setWords] = useState(filter.point ?? "");
  const used = isNarrowed(filter);
  return (
    <details className="group mb-3" open={used}>
      <summary className="link flex min-h-11 cursor-pointer items-center font-bold">
        {used ? "Only some are shown" : "Show only some"}
      </summary>
      <div role="group" aria-label="Filters" className="grid grid-cols-2 gap-2.5 wide:grid-cols-4">
        <SelectField
          label="Drop-off point"
          value={filter.pointId ?? ""}
          onChange={({ target: { value } }) =>
            onFilter({ ...filter, pointId: value === "" ? undefined : (value as PointId) })
          }
        >
          <option value="">All</option>
          {points.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
        </SelectField>
        <TextField
          label="Words of its name"
          type="search"
          maxLength={80}
          value={words}
          onChange={({ target: { value } }) => {
            setWords(value);
            onFilter({ ...filter, point: value.trim() === "" ? undefined : value.trim() });
          }}
        />
        <SelectField
          label="Likely"
          value={filter.polymer ?? ""}
          onChange={({ target: { value } }) =>
            onFilter({ ...filter, polymer: value === "" ? undefined : (value as PolymerAnswer) })
          }
        >
          <option value="">Anything</option>
          {POLYMER_ANSWERS.map((polymer) => (
            <option key={polymer} value={polymer}>
              {POLYMER_NAMES[polymer].name}
            </option>
          ))}
        </SelectField>
        <SelectField
          label="Condition"
          value={filter.condition ?? ""}
          onChange={({ target: { value } }) =>
            onFilter({ ...filter, condition: value === "" ? undefined : (value as Condition) })
          }
        >
          <option value="">Any</option>
          {CONDITIONS.map((condition) => (
            <option key={condition} value={condition}>
              {CONDITION_NAMES[condition]}
            </option>
          ))}
        </SelectField>
      </div>
    </details>
  );
}
