import { BismarMark } from "@/components/ui/bismar-mark";
import { formatCode } from "@/lib/core/bag-code";
import type { PublicBag } from "@/lib/bags/queries";
import type { BagState } from "@/lib/bags/terms";
import { BagSteps } from "./bag-steps";
import { FlakeCard } from "./flake-card";

type PublicBagProps = {
  bag: PublicBag;
  /** Day on which it came into its state: "6 May 2026". */
  since: string;
};

/** What anybody sees who scans a tag: where the bag is now. Names no person. */
export function PublicBagCard({ bag, since }: PublicBagProps) {
  const place =
    bag.pointKind === null || bag.pointKind === "shed" || bag.pointKind === "not-known"
      ? null
      : bag.pointName;
  const { title, text } = SAYS[bag.state](since, place);
  return (
    <FlakeCard seed={bag.code}>
      <div className="flex items-center justify-between gap-4">
        <p className="font-mono text-lg font-bold">
          <span className="sr-only">Tag </span>
          {formatCode(bag.code)}
        </p>
        <BismarMark />
      </div>
      <h1 className="mt-3 text-2xl">{title}</h1>
      <p className="mt-2 text-soft">{text}</p>
      <BagSteps state={bag.state} since={since} />
    </FlakeCard>
  );
}

type Says = (since: string, place: string | null) => { title: string; text: string };

const SAYS: Record<BagState, Says> = {
  printed: (_, place) => ({
    title: "This tag is ready for a bag",
    text: place
      ? `Tie it to a bag of clean, dry plastic and leave the bag at ${place}.`
      : "Tie it to a bag of clean, dry plastic and leave the bag at a drop-off point.",
  }),
  out: (_, place) => ({
    title: "This bag is out at its point",
    text: place ? `It waits at ${place} to be picked up.` : "It waits to be picked up.",
  }),
  "picked-up": (since, place) => ({
    title: "This bag is on its way",
    text: place
      ? `Picked up at ${place} on ${since}. It will be weighed next.`
      : `It came to the shed on ${since} and will be weighed next.`,
  }),
  weighed: (since, place) => ({
    title: `This bag was weighed in on ${since}`,
    text: `${place ? `It came from ${place}. ` : ""}It waits to be sorted by kind and colour.`,
  }),
  sorted: (since, place) => ({
    title: `This bag was sorted on ${since}`,
    text: `${place ? `It came from ${place}. ` : ""}Its plastic lies with others of the same kind and colour, ready to be made into something.`,
  }),
  closed: (since, place) => ({
    title: "This bag has been emptied",
    text: `${place ? `It came from ${place}. ` : ""}Its plastic went on from here on ${since}.`,
  }),
};
