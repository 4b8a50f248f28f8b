"use client";

import { SelectField } from "@/components/ui/select-field";
import { FORM_NAMES, FORMS, KIND_NAMES, KINDS, WASH_NAMES, WASH_STATES } from "@/lib/core/plastics";
import { stockFilterSchema, type StockFilter } from "@/lib/stock/contract/stock";

type Props = { filter: StockFilter; onFilter: (filter: StockFilter) => void };

const FIELDS = [
  { name: "kind", label: "Kind", all: "All", values: KINDS, words: KIND_NAMES },
  { name: "form", label: "Form", all: "All", values: FORMS, words: FORM_NAMES },
  { name: "wash", label: "Washed?", all: "Any", values: WASH_STATES, words: WASH_NAMES },
] as const;

/** Kind, form and wash state; what is left at "all" counts everything. */
export function StockFilters({ filter, onFilter }: Props) {
  return (
    <div
      className="mb-4 grid grid-cols-3 gap-2 wide:flex wide:flex-wrap wide:gap-3"
      role="group"
      aria-label="Filters"
    >
      {FIELDS.map(({ name, label, all, values, words }) => (
        <SelectField
          key={name}
          label={label}
          className="wide:w-48"
          value={filter[name] ?? ""}
          onChange={(event) =>
            onFilter(
              stockFilterSchema.parse({ ...filter, [name]: event.target.value || undefined }),
            )
          }
        >
          <option value="">{all}</option>
          {values.map((value) => (
            <option key={value} value={value}>
              {(words as Record<string, string>)[value]}
            </option>
          ))}
        </SelectField>
      ))}
    </div>
  );
}
