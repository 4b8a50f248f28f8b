"use client";

import {
  createElement,
  useEffect,
  useState,
  type ComponentType,
  type DragEvent,
  type ReactNode,
} from "react";
import type { PhotoPurpose } from "@/lib/uploads/terms";
import { PhotoButtons } from "./photo-buttons";
import type { IntakeProps, PhotoBatch } from "./photo-intake";

/** Asked for again after this long, while there is no signal. */
const AGAIN_MS = 4000;

type Props = Omit<IntakeProps, "batch"> & {
  /** The subject has photos, or may have: they are shown at once. */
  started: boolean;
  onStarted?: () => void;
  /** Accessible name of the part; it is unique on the page. */
  label: string;
  heading: ReactNode;
  /** Under the buttons: another way to add. */
  more?: (add: (files: File[], purpose: PhotoPurpose) => void) => ReactNode;
};

/**
 * Photos of one subject: take, choose, drop or paste them, see them being sent, look at them. It is little more
 * than two buttons, because the weigh-in page must load on a slow phone; the rest travels on first use.
 */
export function PhotoCapture({ started, onStarted, label, heading, more, ...intake }: Props) {
  const [batch, setBatch] = useState<PhotoBatch | null>(null);
  const [over, setOver] = useState(false);
  const [part, setPart] = useState<ComponentType<IntakeProps> | null>(null);
  const [failed, setFailed] = useState(false);
  const wanted = started || batch !== null;

  useEffect(() => {
    if (!wanted) return;
    let timer = 0;
    const load = () =>
      void import("./photo-intake").then(
        ({ PhotoIntake }) => setPart(() => PhotoIntake),
        () => {
          setFailed(true);
          timer = window.setTimeout(load, AGAIN_MS);
        },
      );
    load();
    return () => clearTimeout(timer);
  }, [wanted]);

  const { helperId } = intake;
  const add = (files: File[], purpose: PhotoPurpose = "view") => {
    if (helperId === null) return;
    onStarted?.();
    setBatch({ files, purpose, helperId });
  };
  const drag = (event: DragEvent) => {
    event.preventDefault();
    setOver(helperId !== null && event.type === "dragover");
    const files = [...event.dataTransfer.files];
    if (event.type === "drop" && files.length > 0) add(files);
  };
  return (
    <section
      aria-label={label}
      onDragOver={drag}
      onDragLeave={drag}
      onDrop={drag}
      className={over ? "rounded-control outline-3 outline-offset-4 outline-act" : ""}
    >
      {heading}
      <PhotoButtons take="Take photo" of={label} disabled={helperId === null} onFiles={add} />
      {more?.(add)}
      {part ? createElement(part, { ...intake, batch }) : null}
      {failed && !part ? (
        <p role="status" className="mt-2 text-sm text-warn">
          The server does not answer. Leave this page open; the picture is read when it does.
        </p>
      ) : null}
    </section>
  );
}
