"use client";

import { useParams } from "next/navigation";
import { ButtonLink } from "@/components/ui/button-link";
import { formatCode, readCode } from "@/lib/core/bag-code";
import { FlakeCard } from "./flake-card";

/** The page of a code that opens no bag: mistyped, or none of this scheme's. */
export function UnknownTag() {
  const { code } = useParams<{ code?: string }>();
  const typed = decodeCode(code ?? "");
  const reading = readCode(typed);
  const [title, text] = reading.ok
    ? [
        "No tag has this code",
        `${formatCode(reading.code)} is written rightly, but this scheme has printed no such tag. If it is on a bag, tell whoever picks the bags up.`,
      ]
    : reading.problem === "wrong-check"
      ? [
          "A sign of this code is wrong",
          `The last sign of ${typed} does not fit the others, so one of them was misread. Check it against the tag.`,
        ]
      : [
          "This is not a tag's code",
          "A code has eight letters and figures, such as those under the symbol on a tag. Check it against the tag.",
        ];
  return (
    <FlakeCard seed={typed}>
      <h1 className="text-2xl">{title}</h1>
      <p className="mt-2 text-soft">{text}</p>
      <p className="mt-5">
        <ButtonLink href="/points" variant="quiet">
          Find a drop-off point
        </ButtonLink>
      </p>
    </FlakeCard>
  );
}

/** An address may hold signs that are no text at all. */
function decodeCode(raw: string): string {
  try {
    return decodeURIComponent(raw).slice(0, 40);
  } catch {
    return raw.slice(0, 40);
  }
}
