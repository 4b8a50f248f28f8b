"use client";

import { Notice } from "@/components/ui/notice";
import type { QrSize } from "@/lib/bags/rules/qr";
import { SHEETS, sheetPages, tagDrawing, type TypedSettings } from "@/lib/bags/rules/tag-sheet";
import { LabelSheet } from "./label-sheet";
import { PrintedTag, type PrintedLabel } from "./printed-tag";
import { SheetSettingsForm } from "./sheet-settings";
import { useSheetSettings } from "./use-sheet-settings";
import "./tag-sheet.css";

type LabelSheetsProps = {
  labels: readonly PrintedLabel[];
  /** Of every symbol alike: the addresses differ in the code only. */
  qr: QrSize;
  initial: TypedSettings;
  /** "tag" or "label", for what the page says. */
  noun: "tag" | "label";
};

/** Labels on sheets, as they will be printed, with the settings beside them. */
export function LabelSheets({ labels, qr, initial, noun }: LabelSheetsProps) {
  const form = useSheetSettings(initial);
  const { settings } = form;
  const sheet = SHEETS[settings.sheet];
  const drawing = tagDrawing(sheet, qr);
  const pages = drawing === null ? [] : sheetPages(sheet, labels.length, settings.start);
  const count = `${labels.length} ${labels.length === 1 ? noun : `${noun}s`}`;
  const onSheets = pages.length === 1 ? "1 sheet" : `${pages.length} sheets`;
  return (
    <div className="grid items-start gap-6 rail:grid-cols-[18rem_minmax(0,1fr)]">
      <SheetSettingsForm
        form={form}
        printLabel={drawing === null ? null : `Print ${count} on ${onSheets}`}
        withStart
      />
      {drawing === null ? (
        <Notice tone="bad" title="The symbol does not fit on this label" live="alert">
          The program&apos;s address is so long that the symbol is {qr.totalMm.toFixed(1)} mm wide
          with its margin, and the label is {sheet.label.heightMm.toFixed(1)} mm high. Choose a
          sheet with larger labels, or a shorter PUBLIC_URL.
        </Notice>
      ) : (
        <div
          className={`label-sheets grid gap-5 ${settings.sheet.startsWith("a4") ? "label-sheets-a4" : "label-sheets-letter"}`}
        >
          {pages.map((page, at) => (
            <LabelSheet
              key={at}
              sheet={sheet}
              offsetXMm={settings.offsetXMm}
              offsetYMm={settings.offsetYMm}
              label={`Sheet ${at + 1} of ${pages.length} with ${page.length} ${noun}${page.length === 1 ? "" : "s"}`}
            >
              {page.map((place) => {
                const label = labels[place.tag];
                return label ? (
                  <PrintedTag
                    key={label.code}
                    label={label}
                    place={place}
                    sheet={sheet}
                    qr={qr}
                    drawing={drawing}
                    cutLines={settings.cutLines}
                  />
                ) : null;
              })}
            </LabelSheet>
          ))}
        </div>
      )}
    </div>
  );
}
