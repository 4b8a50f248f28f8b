import { Button } from "@/components/ui/button";
import { SelectField } from "@/components/ui/select-field";
import { TextField } from "@/components/ui/text-field";
import type { SearchAudit } from "@/lib/audit/contract";
import { AUDIT_AREAS } from "@/lib/audit/terms";

type Props = { query: SearchAudit; actors: readonly { id: string; name: string }[] };

/** A plain form that reads: its address can be kept and shared. */
export function AuditForm({ query, actors }: Props) {
  return (
    <form
      action="/audit"
      key={JSON.stringify(query)}
      className="mb-5 grid gap-3 rounded-ticket border border-rule bg-card p-4 wide:grid-cols-6 wide:items-end wide:p-5"
    >
      <TextField
        label="Words or number"
        name="text"
        type="search"
        defaultValue={query.text}
        maxLength={80}
        className="wide:col-span-2"
      />
      <SelectField
        label="About"
        name="area"
        defaultValue={query.area ?? ""}
        placeholder="Everything"
        options={Object.entries(AUDIT_AREAS).map(([value, label]) => ({ value, label }))}
        className="wide:col-span-2"
      />
      <SelectField
        label="By"
        name="actor"
        defaultValue={query.actor ?? ""}
        placeholder="Anybody"
        options={actors.map(({ id, name }) => ({ value: id, label: name }))}
        className="wide:col-span-2"
      />
      <TextField
        label="First day"
        name="from"
        type="date"
        defaultValue={query.from}
        className="wide:col-span-2"
      />
      <TextField
        label="Last day"
        name="to"
        type="date"
        defaultValue={query.to}
        className="wide:col-span-2"
      />
      <Button type="submit" variant="quiet" className="wide:col-span-2">
        Search
      </Button>
    </form>
  );
}
