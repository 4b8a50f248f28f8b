"use client";

import { useEffect, useMemo, useRef } from "react";
import { dealColours, marbleField } from "@/lib/production/rules/marble";

type Props = {
  colours: readonly { name: string; hex: string; thousandths: number }[];
  folded: number;
  seed: number;
  /** Pixels that are drawn; the picture is as wide as its place. */
  width?: number;
  height?: number;
  className?: string;
};

/** The blend as it may come out: drawn from the palette's own colours, each by the area of its share. */
export function BlendPicture({
  colours,
  folded,
  seed,
  width = 480,
  height = 172,
  className = "",
}: Props) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const field = useMemo(
    () => marbleField(seed, folded, width, height),
    [seed, folded, width, height],
  );
  const shown = colours.filter(({ thousandths }) => thousandths > 0);
  const drawn = shown.map(({ hex, thousandths }) => `${hex} ${thousandths}`).join();
  useEffect(() => {
    const context = canvas.current?.getContext("2d");
    const parts = drawn.split(",").map((part) => part.split(" "));
    if (!context || drawn === "") return;
    const dealt = dealColours(
      field,
      parts.map(([, share]) => Number(share)),
    );
    const paints = parts.map(([hex = ""]) =>
      [1, 3, 5].map((at) => Number.parseInt(hex.slice(at, at + 2), 16)),
    );
    const image = context.createImageData(width, height);
    dealt.forEach((colour, at) => {
      const [red = 0, green = 0, blue = 0] = paints[colour] ?? [];
      image.data.set([red, green, blue, 255], at * 4);
    });
    context.putImageData(image, 0, 0);
  }, [drawn, field, width, height]);
  const words = shown.map(({ name, thousandths }) => `${name} ${thousandths / 10} %`).join(", ");
  return (
    <canvas
      ref={canvas}
      width={width}
      height={height}
      role="img"
      aria-label={words === "" ? "No colour yet" : `Blend of ${words}`}
      className={`block w-full rounded-ticket bg-well ${className}`}
    />
  );
}
