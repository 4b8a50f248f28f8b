/** What the workshop of the story plans on its last days: some reserved, one short of a colour, one called off. */
import { instant, type Instant } from "@/lib/core/time";
import { uuidV7 } from "@/lib/core/ids";
import { callOffRun, planRun } from "@/lib/production/commands/plan-run";
import { reserve } from "@/lib/production/commands/reserve";
import type { PlanData } from "@/lib/production/contract/plans";
import type { Cast } from "./cast";
import { seeded } from "./random";
import type { Workshop } from "./workshop-catalogue";

const SEED = 61_207;
const DAY = 24 * 60 * 60 * 1000;

type Told = Pick<
  PlanData,
  "pieceId" | "polymer" | "toolId" | "machineId" | "wantedPieces" | "folded"
> & {
  blend: [colourCode: string, thousandths: number][];
  daysAgo: number;
  then?: "reserve" | "call-off";
};

/** Plans the last runs of the story. */
export function planRuns(cast: Cast, workshop: Workshop, now: Instant): void {
  // Draws of its own: the rest of the story stays as it was.
  const random = seeded(SEED);
  const { coaster, soapDish, sheet, hook, press, moulder } = workshop;
  const stories: Told[] = [
    {
      pieceId: sheet,
      polymer: "PE-HD",
      toolId: null,
      machineId: press,
      wantedPieces: 12,
      folded: 70,
      blend: [
        ["blue", 600],
        ["white", 400],
      ],
      daysAgo: 4,
      then: "reserve",
    },
    {
      pieceId: soapDish,
      polymer: "PE-HD",
      toolId: workshop.soapDishMould,
      machineId: moulder,
      wantedPieces: 60,
      folded: 20,
      blend: [["green", 1000]],
      daysAgo: 3,
      then: "call-off",
    },
    {
      pieceId: coaster,
      polymer: "PE-HD",
      toolId: workshop.coasterMould,
      machineId: moulder,
      wantedPieces: 40,
      folded: 35,
      blend: [
        ["blue", 600],
        ["white", 300],
        ["green", 100],
      ],
      daysAgo: 2,
      then: "reserve",
    },
    {
      pieceId: hook,
      polymer: "PP",
      toolId: workshop.hookMould,
      machineId: moulder,
      wantedPieces: 800,
      folded: 50,
      blend: [
        ["purple", 800],
        ["yellow", 200],
      ],
      daysAgo: 1,
    },
  ];
  for (const { blend, daysAgo, then, ...plan } of stories) {
    const at = instant(now - daysAgo * DAY);
    const ctx = cast.as(cast.lead, "lead", at);
    const requestId = () => uuidV7(at, random.bytes(10));
    const run = planRun(ctx, {
      ...plan,
      requestId: requestId(),
      shares: blend.map(([colourCode, thousandths]) => ({ colourCode, thousandths })),
      seed: Math.floor(random.next() * 4_294_967_295),
    });
    if (then === "reserve") reserve(ctx, { requestId: requestId(), runId: run.id });
    if (then === "call-off") callOffRun(ctx, { requestId: requestId(), runId: run.id });
  }
}
