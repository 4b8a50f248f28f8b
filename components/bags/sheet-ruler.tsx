import { LabelText } from "./label-text";

type SheetRulerProps = {
  direction: "across" | "down";
  lengthMm: number;
  /** How far down (across) or to the right (down) its line stands. */
  atMm: number;
};

/** A millimetre ruler from the paper's edge, with a figure at every centimetre. */
export function SheetRuler({ direction, lengthMm, atMm }: SheetRulerProps) {
  const marks = Array.from({ length: Math.floor(lengthMm) + 1 }, (_, mm) => mm);
  const size = (mm: number) => (mm % 10 === 0 ? 4 : mm % 5 === 0 ? 2.8 : 1.6);
  const path = marks
    .map((mm) =>
      direction === "across" ? `M${mm} ${atMm}v${size(mm)}` : `M${atMm} ${mm}h${size(mm)}`,
    )
    .join("");
  const line = direction === "across" ? `M0 ${atMm}h${lengthMm}` : `M${atMm} 0v${lengthMm}`;
  return (
    <g>
      <path d={line + path} fill="none" stroke="#000000" strokeWidth={0.12} />
      {marks
        .filter((mm) => mm > 0 && mm % 10 === 0 && mm < lengthMm - 2)
        .map((mm) => (
          <LabelText
            key={mm}
            xMm={direction === "across" ? mm : atMm + 5}
            yMm={direction === "across" ? atMm + 7.2 : mm + 1}
            sizeMm={2.6}
            anchor={direction === "across" ? "middle" : "start"}
            className="font-mono"
          >
            {String(mm)}
          </LabelText>
        ))}
    </g>
  );
}
