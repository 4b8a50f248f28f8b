import { Button } from "@/components/ui/button";
import { SelectField } from "@/components/ui/select-field";
import { TextField } from "@/components/ui/text-field";
import {
  FORM_NAMES,
  FORMS,
  KIND_NAMES,
  KINDS,
  POLYMER_ANSWERS,
  POLYMER_NAMES,
  WASH_NAMES,
  WASH_STATES,
} from "@/lib/core/plastics";
import { LOT_STATE_NAMES, LOT_STATES } from "@/lib/stock/terms";

type Props = {
  wanted: Readonly<Record<string, string>>;
  colours: readonly { code: string; name: string }[];
  containers: readonly { id: string; name: string }[];
  /** How many filters besides the search are set: then they are shown at once. */
  set: number;
};

const options = (values: readonly string[], words: Readonly<Record<string, string>>) =>
  values.map((value) => ({ value, label: words[value] ?? value }));

/** Finding lots: a form that needs no script, so that its address can be kept and sent on. */
export function LotsFilter({ wanted, colours, containers, set }: Props) {
  const names = Object.fromEntries(
    POLYMER_ANSWERS.map((polymer) => [polymer, POLYMER_NAMES[polymer].name]),
  );
  const fields = [
    { name: "polymer", label: "Polymer", options: options(POLYMER_ANSWERS, names) },
    {
      name: "colour",
      label: "Colour",
      options: colours.map(({ code, name }) => ({ value: code, label: name })),
    },
    { name: "kind", label: "Kind", options: options(KINDS, KIND_NAMES) },
    { name: "form", label: "Form", options: options(FORMS, FORM_NAMES) },
    { name: "wash", label: "Washed?", options: options(WASH_STATES, WASH_NAMES) },
    {
      name: "container",
      label: "Container",
      options: containers.map(({ id, name }) => ({ value: id, label: name })),
    },
  ];
  return (
    <form action="/stock/lots" method="get" className="mb-5 grid gap-3">
      <div className="flex flex-wrap items-end gap-2.5">
        <TextField
          label="Number, label or place"
          name="q"
          defaultValue={wanted.q ?? ""}
          placeholder="12, K7Q2-9F4M, Rack B"
          enterKeyHint="search"
          className="min-w-0 grow basis-48"
        />
        <SelectField
          label="Which"
          name="state"
          defaultValue={wanted.state ?? "held"}
          options={options(LOT_STATES, LOT_STATE_NAMES)}
          className="grow basis-40 wide:grow-0"
        />
        <Button type="submit" className="max-wide:grow">
          Find lots
        </Button>
      </div>
      <details open={set > 0} className="rounded-control border border-rule bg-card px-4">
        <summary className="flex min-h-11 cursor-pointer items-center font-bold">
          Filters{set > 0 ? `, ${set} set` : ""}
        </summary>
        <div className="grid grid-cols-2 gap-3 pt-1 pb-4 wide:grid-cols-3">
          {fields.map(({ name, label, options: choices }) => (
            <SelectField
              key={name}
              label={label}
              name={name}
              placeholder="All"
              defaultValue={wanted[name] ?? ""}
              options={choices}
            />
          ))}
        </div>
      </details>
    </form>
  );
}
