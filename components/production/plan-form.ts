/** What the planner holds while it is typed: text, so that nothing typed is lost. */
import type { Catalogue, Piece } from "@/lib/production/contract/catalogue";
import type { PlanData } from "@/lib/production/contract/plans";
import type { Share } from "@/lib/production/rules/blend";
import type { Heatable } from "@/lib/production/terms";

export type PlanForm = {
  pieceId: string;
  polymer: Heatable;
  toolId: string;
  machineId: string;
  pieces: string;
  shares: Share[];
  folded: number;
  seed: number;
};

/** Tools and machines that can make a piece. */
export function makersOf(catalogue: Catalogue, piece: Piece | undefined) {
  return {
    tools: catalogue.tools.filter((tool) => tool.pieceId === piece?.id && tool.retiredAt === null),
    machines: catalogue.machines.filter(
      (machine) => machine.method === piece?.method && machine.retiredAt === null,
    ),
  };
}

/** The form for another piece: its first polymer, tool and machine; blend and count stay. */
export function withPiece(form: PlanForm, catalogue: Catalogue, pieceId: string): PlanForm {
  const piece = catalogue.pieces.find(({ id }) => id === pieceId);
  const { tools, machines } = makersOf(catalogue, piece);
  const polymer =
    piece && !piece.polymers.includes(form.polymer) ? piece.polymers[0] : form.polymer;
  return {
    ...form,
    pieceId,
    polymer: polymer ?? form.polymer,
    toolId: piece?.method === "moulding" ? (tools[0]?.id ?? "") : "",
    machineId: machines[0]?.id ?? "",
  };
}

export function emptyPlan(catalogue: Catalogue, seed: number): PlanForm {
  const first = catalogue.pieces.find(({ retiredAt }) => retiredAt === null);
  const bare: PlanForm = {
    pieceId: "",
    polymer: "PE-HD",
    toolId: "",
    machineId: "",
    pieces: "40",
    shares: [],
    folded: 30,
    seed,
  };
  return first ? withPiece(bare, catalogue, first.id) : bare;
}

export function planAsForm(plan: PlanData): PlanForm {
  return {
    pieceId: plan.pieceId,
    polymer: plan.polymer,
    toolId: plan.toolId ?? "",
    machineId: plan.machineId ?? "",
    pieces: String(plan.wantedPieces),
    shares: plan.shares,
    folded: plan.folded,
    seed: plan.seed,
  };
}

/** Pieces as typed; null while it is no whole number above zero. */
export function readPieces(text: string): number | null {
  const digits = text.replace(/\s/g, "");
  return /^[1-9]\d{0,5}$/.test(digits) && Number(digits) <= 100_000 ? Number(digits) : null;
}
