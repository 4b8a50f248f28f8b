"use client";

import { useState } from "react";
import type { Photo } from "@/lib/uploads/contract";
import { THUMB_EDGE_PIXELS } from "@/lib/uploads/terms";
import { photoAlt, type PhotoFacts } from "./photo-alt";
import { photoAddress } from "./photo-address";
import { PhotoViewer } from "./photo-viewer";

type Props = {
  photos: readonly Photo[];
  facts: PhotoFacts;
  /** Called after one was removed; null for a reader who may not. */
  onRemoved: ((photo: Photo) => void) | null;
};

/** Small pictures that open large. */
export function PhotoGallery({ photos, facts, onRemoved }: Props) {
  const [openId, setOpenId] = useState<string | null>(null);
  if (photos.length === 0) return null;
  const edge = THUMB_EDGE_PIXELS;
  return (
    <>
      <ul className="grid grid-cols-3 gap-2 wide:grid-cols-[repeat(auto-fill,minmax(8rem,1fr))]">
        {photos.map((photo, index) => {
          const scale = Math.min(1, edge / Math.max(photo.width, photo.height));
          return (
            <li key={photo.id} className="min-w-0">
              <button
                type="button"
                onClick={() => setOpenId(photo.id)}
                className="relative block w-full cursor-zoom-in overflow-hidden rounded-control border border-rule bg-well"
              >
                <img
                  src={photoAddress(photo.id, "thumb")}
                  alt={photoAlt(facts, photo, index + 1, photos.length)}
                  width={Math.round(photo.width * scale)}
                  height={Math.round(photo.height * scale)}
                  loading="lazy"
                  decoding="async"
                  className="block aspect-square w-full object-cover"
                />
                {photo.purpose === "chip" ? (
                  <span
                    aria-hidden
                    className="absolute bottom-1.5 left-1.5 rounded-plate bg-card px-1.5 py-0.5 text-xs font-bold"
                  >
                    Chip
                  </span>
                ) : null}
              </button>
            </li>
          );
        })}
      </ul>
      <PhotoViewer
        photos={photos}
        facts={facts}
        openId={openId}
        onOpen={setOpenId}
        onRemoved={onRemoved}
      />
    </>
  );
}
