"use client";

import { randomFrom } from "@/lib/core/random";
import { chipPath } from "./flake-shapes";

const FILLS = [
  "fill-flake-blue",
  "fill-flake-pink",
  "fill-flake-red",
  "fill-flake-black",
  "fill-flake-green",
  "fill-flake-yellow",
  "fill-flake-sky",
  "fill-flake-violet",
  "fill-flake-white",
] as const;

type FlakesProps = {
  seed: number;
  /** Size of the drawing's own units. */
  width: number;
  height: number;
  count: number;
  /** Where they lie thickest: towards the right edge, towards the floor, or evenly. */
  thickest?: "right" | "floor" | "evenly";
  /** Half the length of the largest chip. */
  largest?: number;
  className?: string;
  /** Which part stays when the box has another shape. */
  keep?:
    | "xMaxYMid slice"
    | "xMaxYMax slice"
    | "xMidYMax slice"
    | "xMidYMid slice"
    | "xMidYMid meet"
    | "xMaxYMid meet";
};

/**
 * Chips of every colour, strewn from a seed. Ornament: hidden from screen readers.
 *
 * A client component for its weight only: a server component's drawing would be sent twice, once as markup
 * and once as data, and this one is sent as its seed.
 */
export function Flakes({
  seed,
  width,
  height,
  count,
  thickest = "evenly",
  largest = 30,
  className,
  keep = "xMidYMid slice",
}: FlakesProps) {
  const random = randomFrom(seed);
  // Chips of a colour share one path in each of four layers: a third of the bytes, and they still overlap.
  const layers = [0, 1, 2, 3].map(() => FILLS.map(() => ""));
  for (let number = 0; number < count; number += 1) {
    // The root of an even draw crowds towards 1, which is the right edge or the floor.
    const across = random() ** (thickest === "right" ? 0.45 : 1) * width;
    const down = random() ** (thickest === "floor" ? 0.28 : 1) * height;
    const size = largest * (0.2 + 0.8 * random() ** 1.6);
    const layer = layers[Math.floor((number / count) * layers.length)];
    const colour = Math.floor(random() * FILLS.length);
    if (layer) layer[colour] = (layer[colour] ?? "") + chipPath(random, across, down, size);
  }
  return (
    <svg
      aria-hidden
      viewBox={`0 0 ${width} ${height}`}
      preserveAspectRatio={keep}
      className={`pointer-events-none block ${className ?? ""}`}
    >
      {layers.flatMap((layer, depth) =>
        layer.map((path, colour) =>
          path ? (
            // Another engine's sine may round a corner by one unit: not worth a complaint.
            <path
              key={`${depth}-${colour}`}
              d={path}
              className={FILLS[colour]}
              suppressHydrationWarning
            />
          ) : null,
        ),
      )}
    </svg>
  );
}
