"use client";

import { usePathname } from "next/navigation";
import { useState } from "react";
import { Dialog } from "@/components/ui/dialog";
import { PlaceLink } from "./place-link";
import { isInPlace, type Place } from "./places";
import { SignOutButton } from "./sign-out-button";

/** The fifth cell of the bottom bar: the places that have no cell of their own, and signing out. */
export function MoreSheet({ places }: { places: Place[] }) {
  const [open, setOpen] = useState(false);
  const path = usePathname();
  const inside = places.some((place) => isInPlace(path, place.href));
  const close = () => setOpen(false);
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
      <Dialog open={open} onClose={close} title="More">
        {places.length > 0 ? (
          <ul className="-mx-3 mb-2 border-b border-rule pb-2">
            {places.map((place) => (
              <li key={place.id}>
                <PlaceLink place={place} shape="row" onFollow={close} />
              </li>
            ))}
          </ul>
        ) : null}
        <div className="pt-2">
          <SignOutButton />
        </div>
      </Dialog>
    </>
  );
}
