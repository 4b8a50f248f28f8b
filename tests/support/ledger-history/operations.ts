/** All that can happen in a random history, and how it is told when one fails. */
import fc from "fast-check";
import type { Draft } from "@/lib/ledger/commands/post";
import { importOld, open, sort, weighIn } from "./arrivals";
import { count, overdraw, receive, remove, turnAway } from "./departures";
import { someDay, type Line, type Maker } from "./lines";
import { Picks } from "./picks";
import { draw, finish, giveBack, grindUp, step, takePiecesBack } from "./workshop";
import { closeMonth, noonOf, post, takeBack, type World } from "./world";

const MAKERS = {
  weighIn,
  sort,
  open,
  importOld,
  step,
  draw,
  giveBack,
  finish,
  takePiecesBack,
  grindUp,
  count,
  remove,
  receive,
  turnAway,
  overdraw,
} satisfies Record<string, Maker>;
type MakerName = keyof typeof MAKERS;

export type Operation = {
  kind: MakerName | "undo" | "correct" | "undoWhatIsGone" | "closeMonth";
  numbers: number[];
};

const WEIGHTS: Record<Operation["kind"], number> = {
  weighIn: 10,
  sort: 12,
  open: 1,
  importOld: 1,
  step: 6,
  draw: 9,
  giveBack: 2,
  finish: 7,
  takePiecesBack: 2,
  grindUp: 7,
  count: 4,
  remove: 4,
  receive: 2,
  turnAway: 2,
  overdraw: 1,
  undo: 4,
  correct: 10,
  undoWhatIsGone: 1,
  closeMonth: 1,
};

const operation = fc.oneof(
  ...Object.entries(WEIGHTS).map(([kind, weight]) => ({
    weight,
    arbitrary: fc.record({
      kind: fc.constant(kind as Operation["kind"]),
      numbers: fc.array(fc.nat({ max: 99_999 }), { minLength: 24, maxLength: 24 }),
    }),
  })),
);

/** Operations as kinds and numbers; the numbers choose among what the shed holds when their turn comes. */
export const histories = fc.array(operation, { minLength: 12, maxLength: 42, size: "max" });

/** Moves some grams between two lines, so that neither changes sides. */
function shifted(lines: readonly Line[], picks: Picks): Line[] {
  const first = picks.within(0, lines.length - 1);
  const second = (first + picks.within(1, lines.length - 1)) % lines.length;
  const room = (line: Line, sign: 1 | -1): number => {
    if (line.account === "difference" || line.account === "loss") return 50;
    return Math.sign(line.grams) === sign ? 500 : Math.abs(line.grams) - 1;
  };
  const [a, b] = [lines[first]!, lines[second]!];
  const by = picks.within(0, Math.min(room(a, 1), room(b, -1)));
  return lines
    .map((line, at) =>
      at === first
        ? { ...line, grams: line.grams + by }
        : at === second
          ? { ...line, grams: line.grams - by }
          : line,
    )
    .filter((line) => line.grams !== 0);
}

/** What should have stood there: other amounts, another point, another lot, another day. */
function changed(world: World, drafts: readonly Draft[], picks: Picks): Draft[] {
  const wrong = picks.within(0, drafts.length - 1);
  return drafts.map((draft, at) => {
    if (at !== wrong || draft.kind === "receipt") return draft;
    let lines = picks.often(8) ? shifted(draft.lines, picks) : [...draft.lines];
    if (picks.often(3)) {
      const { no } = picks.one(world.origins)!;
      lines = lines.map((line) => (line.account === "source" ? { ...line, originNo: no } : line));
    }
    if (picks.often(3)) {
      lines = lines.map((line) => {
        if (line.account !== "lot" || draft.kind === "draw") return line;
        const twin = world.lots.find(
          (lot) =>
            lot.material === line.materialId &&
            !lines.some((other) => "holderId" in other && other.holderId === lot.holder),
        );
        return twin ? { ...line, holderId: twin.holder } : line;
      });
    }
    const occurredAt = picks.often(3) ? noonOf(someDay(picks)) : draft.occurredAt;
    return { ...draft, occurredAt, lines };
  });
}

const told = (drafts: readonly Draft[]): string =>
  drafts
    .map(({ kind, occurredAt, lines }) => {
      const parts = lines.map((line) => {
        const holder = "holderId" in line ? ` ${line.holderId}/${line.materialId}` : "";
        const origin = "originNo" in line ? ` from ${line.originNo}` : "";
        return `${line.account}${holder}${origin} ${line.grams}`;
      });
      return `${kind} ${new Date(occurredAt).toISOString().slice(0, 10)} [${parts.join(", ")}]`;
    })
    .join(" + ");

/** Does one operation in both, and adds it to the story. */
export function perform(world: World, { kind, numbers }: Operation): void {
  const picks = new Picks(numbers);
  if (kind === "closeMonth") {
    world.story.push("close the next month");
    closeMonth(world);
  } else if (kind === "undo" || kind === "correct" || kind === "undoWhatIsGone") {
    const act = picks.one(
      world.acts.filter(({ state }) => (state === "stands") === (kind !== "undoWhatIsGone")),
    );
    if (!act) return;
    const drafts = kind === "correct" ? changed(world, act.drafts, picks) : [];
    world.story.push(`${kind} act ${act.id}${drafts.length > 0 ? ` to ${told(drafts)}` : ""}`);
    takeBack(world, act, drafts);
  } else {
    const drafts = MAKERS[kind](world, picks);
    if (drafts.length === 0) return;
    world.story.push(told(drafts));
    post(world, drafts);
  }
}
