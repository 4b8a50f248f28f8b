import type { LabelKind } from "@/lib/bags/terms";
import { FlakeCard } from "./flake-card";

const ON: Record<Exclude<LabelKind, "bag">, string> = {
  lot: "a container of sorted plastic",
  container: "a container that bags are weighed in",
  run: "a production run",
  batch: "a batch of finished pieces",
};

type OtherLabelProps = { code: string; kind: Exclude<LabelKind, "bag"> };

/** A label of the shed that is on no bag. */
export function OtherLabel({ code, kind }: OtherLabelProps) {
  return (
    <FlakeCard seed={code}>
      <h1 className="text-2xl">This label is on no bag</h1>
      <p className="mt-2 text-soft">
        It belongs to {ON[kind]}. The people in the shed scan it at work.
      </p>
    </FlakeCard>
  );
}
