"use client";

import { Button } from "@/components/ui/button";
import { CheckField } from "@/components/ui/check-field";
import { Icon } from "@/components/ui/icon";
import { SelectField } from "@/components/ui/select-field";
import { TextField } from "@/components/ui/text-field";
import { labelsPerPage, readOffset, SHEET_IDS, SHEETS } from "@/lib/bags/rules/tag-sheet";
import type { SheetForm } from "./use-sheet-settings";

const OPTIONS = SHEET_IDS.map((id) => ({ value: id, label: SHEETS[id].name }));
const OFFSET_ERROR = "Type millimetres between −10 and 10, such as 0.5 or −1.";

type SheetSettingsFormProps = {
  form: SheetForm;
  /** "Print 21 tags"; null where nothing can be printed. */
  printLabel: string | null;
  /** A calibration page has no first free label. */
  withStart: boolean;
};

/** How the sheets are printed; every change shows below at once. */
export function SheetSettingsForm({ form, printLabel, withStart }: SheetSettingsFormProps) {
  const { settings, typed, change } = form;
  const most = labelsPerPage(SHEETS[settings.sheet]);
  const startFits = typed.start === String(settings.start);
  return (
    <div className="grid gap-4 print:hidden">
      <SelectField
        label="Sheet"
        options={OPTIONS}
        value={settings.sheet}
        onChange={(event) => change({ sheet: event.target.value })}
      />
      {withStart ? (
        <TextField
          label="First free label"
          hint={`On a used sheet: count row by row from the top left, 1 to ${most}.`}
          inputMode="numeric"
          mono
          value={typed.start}
          onChange={(event) => change({ start: event.target.value.trim() })}
          error={startFits ? undefined : `Type a number from 1 to ${most}.`}
        />
      ) : null}
      <div className="grid grid-cols-2 gap-3">
        <TextField
          label="Move right"
          unit="mm"
          mono
          inputMode="text"
          value={typed.x}
          onChange={(event) => change({ x: event.target.value })}
          error={readOffset(typed.x) === null ? OFFSET_ERROR : undefined}
        />
        <TextField
          label="Move down"
          unit="mm"
          mono
          inputMode="text"
          value={typed.y}
          onChange={(event) => change({ y: event.target.value })}
          error={readOffset(typed.y) === null ? OFFSET_ERROR : undefined}
        />
      </div>
      <CheckField
        label="Cutting lines"
        hint="For plain paper. Leave them out on stickers."
        checked={settings.cutLines}
        onChange={(event) => change({ lines: event.target.checked ? "1" : "0" })}
      />
      {printLabel === null ? null : (
        <Button onClick={() => window.print()}>
          <Icon name="print" />
          {printLabel}
        </Button>
      )}
      <p className="text-sm text-soft">
        In the print window choose the same paper, no margins and a scale of 100 %.
      </p>
    </div>
  );
}
