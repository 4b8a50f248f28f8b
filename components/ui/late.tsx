"use client";

import { createElement, useEffect, useState, type ComponentType } from "react";
import { Notice } from "./notice";

type Props<Given extends object> = {
  /** Constant, such as a function outside the component. */
  load: () => Promise<ComponentType<Given>>;
  /** What the part is given; null while it is not shown. */
  given: Given | null;
};

/**
 * A part of the page that travels when it is first wanted, and is asked for again on the next wish if that
 * failed: without signal a page must neither break nor remember that it did.
 */
export function Late<Given extends object>({ load, given }: Props<Given>) {
  const [part, setPart] = useState<ComponentType<Given> | "failed" | null>(null);
  const wanted = given !== null;
  useEffect(() => {
    if (!wanted) return;
    let left = false;
    load().then(
      (loaded) => {
        if (!left) setPart(() => loaded);
      },
      () => {
        if (!left) setPart("failed");
      },
    );
    return () => {
      left = true;
    };
  }, [load, wanted]);

  if (!given || !part) return null;
  if (part === "failed") {
    return (
      <Notice tone="warn" title="Not opened" live="status" className="mb-3">
        The server did not answer, so this part could not be fetched. What you typed is still here;
        try again in a moment.
      </Notice>
    );
  }
  return createElement(part, given);
}
