"use client";

import { useRouter } from "next/navigation";
import { useCallback, useState, type SubmitEvent } from "react";
import { Button } from "@/components/ui/button";
import { Icon } from "@/components/ui/icon";
import { TextField } from "@/components/ui/text-field";
import { readScan } from "@/lib/core/bag-code";
import { CameraView } from "../weighing/camera-view";
import { CODE_SENTENCES } from "../weighing/read-form";

/** The bag's tag: scanned with the camera, read by a hand scanner, or typed. A wrong code is told at once. */
export function CodeEntry() {
  const router = useRouter();
  const [text, setText] = useState("");
  const [problem, setProblem] = useState<string>();
  const [scanning, setScanning] = useState(false);

  const take = useCallback(
    (read: string) => {
      const code = readScan(read);
      if (code) router.push(`/sorting/${code}`);
      else setProblem(read.trim() === "" ? CODE_SENTENCES.empty : CODE_SENTENCES.wrong);
    },
    [router],
  );

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
          Sort it
        </Button>
      </form>
    </div>
  );
}
