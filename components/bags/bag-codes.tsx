"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { formatCode } from "@/lib/core/bag-code";
import { ReplaceTagDialog, type NewTag } from "./replace-tag-dialog";

type Props = {
  /** All codes that open the bag, the first one first. */
  codes: readonly string[];
  mayTag: boolean;
};

/** The codes of a bag that has more than one, and the way to another when its tag is lost. */
export function BagCodes({ codes, mayTag }: Props) {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const [given, setGiven] = useState<NewTag | null>(null);
  const [first] = codes;
  return (
    <>
      {given ? (
        <Notice
          tone="ok"
          live="status"
          title={
            given.drawn
              ? `Write ${formatCode(given.code)} on the bag`
              : `${formatCode(given.code)} is on this bag`
          }
        >
          {given.drawn ? "It is this bag's new code. " : ""}The old code opens it too.
        </Notice>
      ) : null}
      {codes.length > 1 ? (
        <p>
          <span className="text-soft">Codes</span>
          {codes.map((code, at) => (
            <span key={code}>
              {at === 0 ? " " : at === codes.length - 1 ? " and " : ", "}
              <strong className="font-mono tracking-tighter whitespace-nowrap">
                {formatCode(code)}
              </strong>
            </span>
          ))}
          <span className="block text-sm text-soft">
            {codes.length === 2 ? "Both codes open this bag." : "Each of them opens this bag."}
          </span>
        </p>
      ) : null}
      {mayTag && first ? (
        <p>
          <Button variant="quiet" size="small" onClick={() => setOpen(true)}>
            Replace a lost tag
          </Button>
        </p>
      ) : null}
      {open && first ? (
        <ReplaceTagDialog
          code={first}
          onClose={() => setOpen(false)}
          onDone={(tag) => {
            setOpen(false);
            setGiven(tag);
            router.refresh();
          }}
        />
      ) : null}
    </>
  );
}
