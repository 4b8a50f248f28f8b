"use client";

import type { ComponentProps } from "react";
import { Notice } from "@/components/ui/notice";
import type { AskDialog } from "./ask-dialog";
import type { CameraView } from "./camera-view";
import type { SpareTagDialog } from "./spare-tag-dialog";
import { useLate } from "./use-late";

/** Parts that a first bag with a typed code needs none of: they travel when they are first wanted. */
const loadCamera = async () => (await import("./camera-view")).CameraView;
const loadSpareTag = async () => (await import("./spare-tag-dialog")).SpareTagDialog;
const loadAsk = async () => (await import("./ask-dialog")).AskDialog;

type Props = {
  /** null while it is not shown. */
  camera: ComponentProps<typeof CameraView> | null;
  spareTag: ComponentProps<typeof SpareTagDialog> | null;
  ask: ComponentProps<typeof AskDialog> | null;
};

/** The camera's picture and the two dialogs of the weigh-in. */
export function LateParts({ camera, spareTag, ask }: Props) {
  const Camera = useLate(loadCamera, camera !== null);
  const SpareTag = useLate(loadSpareTag, spareTag !== null);
  const Ask = useLate(loadAsk, ask !== null);
  if (Camera === "failed" || SpareTag === "failed" || Ask === "failed") {
    return (
      <Notice tone="warn" title="Not opened" live="status" className="mb-3">
        The server did not answer, so this part could not be fetched. What you typed is still here;
        type the code, or try again in a moment.
      </Notice>
    );
  }
  return (
    <>
      {Camera && camera ? <Camera {...camera} /> : null}
      {SpareTag && spareTag ? <SpareTag {...spareTag} /> : null}
      {Ask && ask ? <Ask {...ask} /> : null}
    </>
  );
}
