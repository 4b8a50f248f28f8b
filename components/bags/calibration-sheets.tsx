"use client";

import { SHEETS, labelPlace, labelsPerPage, type TypedSettings } from "@/lib/bags/rules/tag-sheet";
import { CrossHair } from "./cross-hair";
import { LabelSheet } from "./label-sheet";
import { LabelText } from "./label-text";
import { SheetRuler } from "./sheet-ruler";
import { SheetSettingsForm } from "./sheet-settings";
import { useSheetSettings } from "./use-sheet-settings";
import "./tag-sheet.css";

/** Where the cross to measure stands: this far from the paper's left and top edge when all is right. */
const CROSS_MM = 30;

/** A sheet to find out how far a printer prints beside the mark. It is moved by the offsets set, as tags are. */
export function CalibrationSheets({ initial }: { initial: TypedSettings }) {
  const form = useSheetSettings(initial);
  const { settings } = form;
  const sheet = SHEETS[settings.sheet];
  const { widthMm, heightMm } = sheet.paper;
  const places = Array.from({ length: labelsPerPage(sheet) }, (_, at) => labelPlace(sheet, at));
  return (
    <div className="grid items-start gap-6 rail:grid-cols-[18rem_minmax(0,1fr)]">
      <div className="grid gap-5 print:hidden">
        <ol className="grid list-decimal gap-2 pl-5">
          <li>Print this page on plain paper.</li>
          <li>
            Measure from the paper&apos;s left edge to the middle of the large cross, and from the
            top edge. Both should be {CROSS_MM} mm.
          </li>
          <li>
            Type what is missing: 29 mm from the left means move right 1; 31.5 mm means move right
            −1.5. Down likewise.
          </li>
          <li>Print again, and hold it with a sheet of labels against the light.</li>
        </ol>
        <SheetSettingsForm form={form} printLabel="Print the calibration sheet" withStart={false} />
      </div>
      <div
        className={`label-sheets ${settings.sheet.startsWith("a4") ? "label-sheets-a4" : "label-sheets-letter"}`}
      >
        <LabelSheet
          sheet={sheet}
          offsetXMm={settings.offsetXMm}
          offsetYMm={settings.offsetYMm}
          label="Calibration sheet with the outline of every label, rulers and a cross to measure"
        >
          {places.map(({ leftMm, topMm }, at) => (
            <rect
              key={at}
              x={leftMm}
              y={topMm}
              width={sheet.label.widthMm}
              height={sheet.label.heightMm}
              fill="none"
              stroke="#9a9a9a"
              strokeWidth={0.2}
            />
          ))}
          <SheetRuler direction="across" lengthMm={widthMm} atMm={heightMm / 2 + 10} />
          <SheetRuler direction="down" lengthMm={heightMm} atMm={widthMm * 0.75} />
          <CrossHair xMm={CROSS_MM} yMm={CROSS_MM} radiusMm={10} />
          <CrossHair xMm={widthMm - CROSS_MM} yMm={CROSS_MM} radiusMm={4} />
          <CrossHair xMm={CROSS_MM} yMm={heightMm - CROSS_MM} radiusMm={4} />
          <CrossHair xMm={widthMm - CROSS_MM} yMm={heightMm - CROSS_MM} radiusMm={4} />
          <LabelText
            xMm={CROSS_MM + 14}
            yMm={CROSS_MM - 3}
            sizeMm={4.2}
            className="font-heading font-bold"
          >
            {`${CROSS_MM} mm from the left, ${CROSS_MM} mm from the top`}
          </LabelText>
          <LabelText xMm={CROSS_MM + 14} yMm={CROSS_MM + 3} sizeMm={3.4} className="font-body">
            {`${sheet.name}; moved right ${settings.offsetXMm} mm, down ${settings.offsetYMm} mm`}
          </LabelText>
        </LabelSheet>
      </div>
    </div>
  );
}
