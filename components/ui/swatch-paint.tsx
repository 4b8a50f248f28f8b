import { randomFrom } from "@/lib/core/random";
import { chipPath, hatchPath } from "./flake-shapes";

/** How a colour is shown: plain chips of it, several colours, see-through, or what is turned away. */
export type SwatchPattern = "plain" | "mixed" | "clear" | "reject";

type SwatchPaintProps = {
  /** "#1f46d6"; not read for "mixed", "clear" and "reject". */
  hex?: string | null;
  pattern?: SwatchPattern;
  /** Same seed, same chips. Leave out for a flat area without chips. */
  seed?: number;
  /** Size of the area in px; it is drawn from the floor up and cut off by what holds it. */
  width: number;
  height: number;
  className?: string;
};

const MIXED = [
  "fill-flake-blue",
  "fill-flake-yellow",
  "fill-flake-red",
  "fill-flake-green",
  "fill-flake-white",
  "fill-flake-pink",
] as const;

function checker(width: number, height: number): string {
  let path = "";
  for (let y = 0; y < height; y += 6) {
    for (let x = (y / 6) % 2 ? 6 : 0; x < width; x += 12) path += `M${x} ${y}h6v6h-6z`;
  }
  return path;
}

function chips(seed: number, count: number, width: number, height: number, least = 4): string {
  const random = randomFrom(seed);
  let path = "";
  for (let number = 0; number < count; number += 1) {
    path += chipPath(random, random() * width, random() * height, least + random() * 6);
  }
  return path;
}

/** A flat area of one plastic. Ornament: the colour's name always stands beside it. */
export function SwatchPaint({
  hex,
  pattern = "plain",
  seed,
  width,
  height,
  className = "",
}: SwatchPaintProps) {
  const count = Math.round((width * height) / 260);
  return (
    <svg
      aria-hidden
      viewBox={`0 0 ${width} ${height}`}
      preserveAspectRatio="xMidYMax slice"
      className={`pointer-events-none block size-full ${className}`}
    >
      {pattern === "plain" ? (
        <>
          <rect width={width} height={height} fill={hex ?? "#80867a"} />
          {seed === undefined ? null : (
            <>
              <path d={chips(seed, count, width, height)} fill="#ffffff" fillOpacity=".2" />
              <path d={chips(seed + 1, count, width, height)} fill="#16211d" fillOpacity=".13" />
            </>
          )}
        </>
      ) : null}
      {pattern === "mixed" ? (
        seed === undefined ? (
          MIXED.slice(0, 4).map((fill, at) => (
            <rect
              key={fill}
              x={(at * width) / 4}
              width={width / 4}
              height={height}
              className={fill}
            />
          ))
        ) : (
          <>
            <rect width={width} height={height} className="fill-rule" />
            {MIXED.map((fill, at) => (
              <path
                key={fill}
                d={chips(seed + at, Math.ceil(count / 3), width, height, 6)}
                className={fill}
              />
            ))}
          </>
        )
      ) : null}
      {pattern === "clear" ? (
        <>
          <rect width={width} height={height} fill="#fffdf8" />
          <path d={checker(width, height)} fill="#d8d2c3" />
        </>
      ) : null}
      {pattern === "reject" ? (
        <>
          <rect width={width} height={height} className="fill-card" />
          <path
            d={hatchPath(width, height, 11)}
            className="fill-none stroke-bad"
            strokeWidth="3.2"
          />
        </>
      ) : null}
    </svg>
  );
}
