import type { ReactNode } from "react";
import type { SheetLayout } from "@/lib/bags/rules/tag-sheet";

/** Cut off below, so that rounding never pushes the sheet over the paper's edge and onto a second one. */
const SHORTER_MM = 0.3;

type LabelSheetProps = {
  sheet: SheetLayout;
  offsetXMm: number;
  offsetYMm: number;
  /** Read aloud: "Sheet 1 of 2, 21 tags". */
  label: string;
  children: ReactNode;
};

/** One sheet of paper as a drawing in millimetres from its top left corner. */
export function LabelSheet({ sheet, offsetXMm, offsetYMm, label, children }: LabelSheetProps) {
  const { widthMm } = sheet.paper;
  const heightMm = sheet.paper.heightMm - SHORTER_MM;
  return (
    <svg
      role="img"
      aria-label={label}
      viewBox={`0 0 ${widthMm} ${heightMm}`}
      style={
        {
          "--paper-width": `${widthMm}mm`,
          "--paper-height": `${heightMm}mm`,
        } as React.CSSProperties
      }
      className="label-sheet"
    >
      <g transform={`translate(${offsetXMm} ${offsetYMm})`}>{children}</g>
    </svg>
  );
}
