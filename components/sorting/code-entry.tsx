"use client";

import { useCallback, useState, type SubmitEvent } from "react";
import { CameraView } from "@/components/scanner/camera-view";
import type { Verdict } from "@/components/scanner/feedback";
import { useWedge } from "@/components/scanner/use-wedge";
import { Button } from "@/components/ui/button";
import { Icon } from "@/components/ui/icon";
import { TextField } from "@/components/ui/text-field";
import { readScan, type LabelCode } from "@/lib/core/bag-code";
import { CODE_SENTENCES } from "../weighing/read-form";

type Props = {
  /** Constant between renders. */
  onCode: (code: LabelCode) => void;
  /** What the button does: "Sort it". */
  action: string;
};

/** The bag's tag: scanned with the camera, read by a hand scanner, or typed. A wrong code is told at once. */
export function CodeEntry({ onCode, action }: Props) {
  const [text, setText] = useState("");
  const [problem, setProblem] = useState<string>();
  const [scanning, setScanning] = useState(false);

  const take = useCallback(
    (read: string): Verdict => {
      const code = readScan(read);
      if (code) {
        setText("");
        setProblem(undefined);
        onCode(code);
        return "read";
      }
      setProblem(read.trim() === "" ? CODE_SENTENCES.empty : CODE_SENTENCES.wrong);
      return "unknown";
    },
    [onCode],
  );
  useWedge(take);

  function open(event: SubmitEvent) {
    event.preventDefault();
    take(text);
  }

  return (
    <div className="rail:max-w-xl">
      {scanning ? <CameraView onRead={take} onTrouble={() => setScanning(false)} /> : null}
      <form onSubmit={open} className="flex flex-wrap items-end gap-2.5">
        <TextField
          label="Code on the tag"
          placeholder="K7Q2-9F4M"
          mono
          autoComplete="off"
          autoCapitalize="characters"
          spellCheck={false}
          enterKeyHint="go"
          value={text}
          onChange={(event) => {
            setText(event.target.value);
            setProblem(undefined);
          }}
          error={problem}
          className="min-w-0 grow basis-44"
        />
        <Button
          variant="quiet"
          aria-pressed={scanning}
          onClick={() => setScanning(!scanning)}
          className="max-wide:grow"
        >
          <Icon name="camera" />
          {scanning ? "Stop scanning" : "Scan"}
        </Button>
        <Button type="submit" className="max-wide:grow">
          {action}
        </Button>
      </form>
    </div>
  );
}
