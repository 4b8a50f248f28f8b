type CrossHairProps = { xMm: number; yMm: number; radiusMm: number };

/** A cross in a circle, to measure to. */
export function CrossHair({ xMm, yMm, radiusMm }: CrossHairProps) {
  const arm = radiusMm * 1.25;
  return (
    <g fill="none" stroke="#000000" strokeWidth={0.15}>
      <circle cx={xMm} cy={yMm} r={radiusMm} />
      <path d={`M${xMm - arm} ${yMm}h${2 * arm}M${xMm} ${yMm - arm}v${2 * arm}`} />
    </g>
  );
}
