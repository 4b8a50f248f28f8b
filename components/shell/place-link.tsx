"use client";

import Link from "next/link";
import { usePathname } from "next/navigation";
import { isInPlace, type Place } from "./places";

type PlaceLinkProps = { place: Place; shape: "rail" | "bar" | "row"; onFollow?: () => void };

const SHAPES = {
  rail: "flex min-h-11 items-center rounded-control px-3 py-2 font-bold",
  bar: "flex h-12 items-center justify-center rounded-control text-center text-[0.875rem] font-bold tracking-tight whitespace-nowrap",
  row: "flex min-h-14 items-center rounded-control px-3 text-lg font-bold",
} as const;

/** One place in the navigation; the one we are in stands on ink. */
export function PlaceLink({ place, shape, onFollow }: PlaceLinkProps) {
  const here = isInPlace(usePathname(), place.href);
  return (
    <Link
      href={place.href}
      prefetch={false}
      onClick={onFollow}
      aria-current={here ? "page" : undefined}
      className={`${SHAPES[shape]} ${here ? "bg-ink text-paper" : "text-soft hover:bg-well hover:text-ink"}`}
    >
      {place.label}
    </Link>
  );
}
