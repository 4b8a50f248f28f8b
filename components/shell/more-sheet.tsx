"use client";

import { Dialog } from "@/components/ui/dialog";
import { PlaceLink } from "./place-link";
import type { Place } from "./places";
import { SignOutButton } from "./sign-out-button";

type MoreSheetProps = { places: Place[]; onClose: () => void };

/** The places that have no cell of their own in the bottom bar, and signing out. */
export function MoreSheet({ places, onClose }: MoreSheetProps) {
  return (
    <Dialog open onClose={onClose} title="More">
      {places.length > 0 ? (
        <ul className="-mx-3 mb-2 border-b border-rule pb-2">
          {places.map((place) => (
            <li key={place.id}>
              <PlaceLink place={place} shape="row" onFollow={onClose} />
            </li>
          ))}
        </ul>
      ) : null}
      <div className="pt-2">
        <SignOutButton />
      </div>
    </Dialog>
  );
}
