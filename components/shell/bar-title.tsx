"use client";

import { usePathname } from "next/navigation";
import { isInPlace, type Place } from "./places";

/** The name of the place on the phone's top bar. Hidden from screen readers: the page's h1 says it. */
export function BarTitle({ places }: { places: Place[] }) {
  const path = usePathname();
  const here = places.find((place) => isInPlace(path, place.href));
  return (
    <span aria-hidden className="truncate font-heading text-xl font-bold">
      {here?.label ?? "Bismar"}
    </span>
  );
}
