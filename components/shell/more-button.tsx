"use client";

import { usePathname } from "next/navigation";
import { useState } from "react";
import { Late } from "@/components/ui/late";
import { isInPlace, type Place } from "./places";

const loadSheet = async () => (await import("./more-sheet")).MoreSheet;

/** The fifth cell of the bottom bar. Its sheet travels when it is first opened. */
export function MoreButton({ places }: { places: Place[] }) {
  const [open, setOpen] = useState(false);
  const path = usePathname();
  const inside = places.some((place) => isInPlace(path, place.href));
  return (
    <>
      <button
        type="button"
        aria-haspopup="dialog"
        onClick={() => setOpen(true)}
        className={`h-12 rounded-control text-[0.875rem] font-bold ${inside ? "bg-ink text-paper" : "text-soft"}`}
      >
        More
      </button>
      <div className="fixed inset-x-3 bottom-16 empty:hidden">
        <Late load={loadSheet} given={open ? { places, onClose: () => setOpen(false) } : null} />
      </div>
    </>
  );
}
