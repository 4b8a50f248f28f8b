type LabelTextProps = {
  /** Baseline, in mm. */
  xMm: number;
  yMm: number;
  sizeMm: number;
  className: string;
  anchor?: "start" | "middle" | "end";
  children: string;
};

/** Text on a label. Drawn ten times as large and scaled down, for browsers that refuse small type. */
export function LabelText({
  xMm,
  yMm,
  sizeMm,
  className,
  anchor = "start",
  children,
}: LabelTextProps) {
  return (
    <text
      transform={`translate(${xMm} ${yMm}) scale(.1)`}
      fontSize={sizeMm * 10}
      textAnchor={anchor}
      className={className}
    >
      {children}
    </text>
  );
}
