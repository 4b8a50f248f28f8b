import { formatCode } from "@/lib/core/bag-code";
import type { QrSize } from "@/lib/bags/rules/qr";
import type { LabelPlace, SheetLayout, TagDrawing } from "@/lib/bags/rules/tag-sheet";
import { LabelText } from "./label-text";

/** What one label says: its code, the outline of its symbol in modules, three lines of words. */
export type PrintedLabel = {
  code: string;
  path: string;
  words: readonly [string, string, string];
};

type PrintedTagProps = {
  label: PrintedLabel;
  place: LabelPlace;
  sheet: SheetLayout;
  qr: QrSize;
  drawing: TagDrawing;
  cutLines: boolean;
};

/** One label of a sheet, as in print: the symbol, the code in two lines, what to do. */
export function PrintedTag({ label, place, sheet, qr, drawing, cutLines }: PrintedTagProps) {
  const shown = formatCode(label.code);
  return (
    <g transform={`translate(${place.leftMm} ${place.topMm})`}>
      {cutLines ? (
        <rect
          width={sheet.label.widthMm}
          height={sheet.label.heightMm}
          fill="none"
          stroke="#9a9a9a"
          strokeWidth={0.2}
          strokeDasharray="1 1"
        />
      ) : null}
      <path
        transform={`translate(${drawing.symbolLeftMm} ${drawing.symbolTopMm}) scale(${qr.moduleMm})`}
        d={label.path}
        fillRule="evenodd"
        fill="#000000"
      />
      {[shown.slice(0, 5), shown.slice(5)].map((line, at) => (
        <LabelText
          key={at}
          xMm={drawing.textLeftMm}
          yMm={drawing.codeBaselinesMm[at === 0 ? 0 : 1]}
          sizeMm={drawing.codeSizeMm}
          className="font-mono font-extrabold"
        >
          {line}
        </LabelText>
      ))}
      {label.words.map((line, at) => (
        <LabelText
          key={at}
          xMm={drawing.textLeftMm}
          yMm={drawing.wordBaselinesMm[at] ?? drawing.wordBaselinesMm[2]}
          sizeMm={drawing.wordSizeMm}
          className="font-body"
        >
          {line}
        </LabelText>
      ))}
    </g>
  );
}
