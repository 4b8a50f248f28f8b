"use client";

import { useQuery } from "@tanstack/react-query";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { CommandNotice } from "@/components/forms/command-notice";
import { fetchEndpoint } from "@/components/forms/fetch-endpoint";
import { QueryProvider } from "@/components/forms/query-provider";
import { useCommand } from "@/components/forms/use-command";
import { Button } from "@/components/ui/button";
import { ButtonLink } from "@/components/ui/button-link";
import { EmptyState } from "@/components/ui/empty-state";
import { formatKg } from "@/lib/core/mass";
import type { Id } from "@/lib/core/ids";
import type { Catalogue } from "@/lib/production/contract/catalogue";
import {
  changePlanEndpoint,
  planRunEndpoint,
  type planStockEndpoint,
  type PlanData,
} from "@/lib/production/contract/plans";
import { sumOfShares, WHOLE } from "@/lib/production/rules/blend";
import { planFor } from "@/lib/production/rules/plan";
import { BlendEditor } from "./blend-editor";
import { BlendStanding } from "./blend-standing";
import { HeatCautions } from "./heat-cautions";
import { emptyPlan, planAsForm, readPieces, type PlanForm } from "./plan-form";
import { PlanFields } from "./plan-fields";
import { Working } from "./working";

type Props = {
  catalogue: Catalogue;
  /** The run whose plan is changed; null: a new one. */
  run: { id: Id<"run">; number: number; plan: PlanData } | null;
  seed: number;
};

/** Plans a run: what it needs, of which colours, and whether there is enough. */
export function Planner(props: Props) {
  return (
    <QueryProvider>
      <Table {...props} />
    </QueryProvider>
  );
}

function Table({ catalogue, run, seed }: Props) {
  const router = useRouter();
  const [form, setForm] = useState<PlanForm>(() =>
    run ? planAsForm(run.plan) : emptyPlan(catalogue, seed),
  );
  const add = useCommand(planRunEndpoint);
  const change = useCommand(changePlanEndpoint);
  const command = run ? change : add;
  const stock = useQuery({
    queryKey: ["plan-stock", form.pieceId, form.polymer],
    queryFn: ({ signal }) =>
      fetchEndpoint<typeof planStockEndpoint>(
        { method: "GET", path: "/api/pieces/{pieceId}/stock" },
        { pieceId: form.pieceId, polymer: form.polymer },
        signal,
      ),
    enabled: form.pieceId !== "",
    refetchInterval: 15_000,
  });

  const piece = catalogue.pieces.find(({ id }) => id === form.pieceId);
  const density = catalogue.densities.find(({ polymer }) => polymer === form.polymer);
  const pieces = readPieces(form.pieces);
  const parts =
    piece && density
      ? {
          piece,
          density,
          tool: catalogue.tools.find(({ id }) => id === form.toolId) ?? null,
          machine: catalogue.machines.find(({ id }) => id === form.machineId) ?? null,
        }
      : null;
  const plan = parts && pieces !== null ? planFor(pieces, parts) : null;
  const need = plan?.kind === "need" ? plan.need : null;
  const shares = form.shares.filter(({ thousandths }) => thousandths > 0);
  const whole = sumOfShares(shares) === WHOLE;

  const save = async () => {
    if (pieces === null) return;
    const data = {
      pieceId: form.pieceId as Id<"piece">,
      polymer: form.polymer,
      toolId: (form.toolId || null) as Id<"tool"> | null,
      machineId: (form.machineId || null) as Id<"machine"> | null,
      wantedPieces: pieces,
      shares,
      folded: form.folded,
      seed: form.seed,
    };
    const result = run ? await change.send({ ...data, runId: run.id }) : await add.send(data);
    if (result.kind === "done") router.push(`/runs/${result.receipt.number}`);
  };

  if (!piece || !density || !parts) {
    return (
      <EmptyState
        title="Nothing to make yet"
        action={<ButtonLink href="/catalogue">Go to the catalogue</ButtonLink>}
      >
        The catalogue has no piece. Add what the workshop makes, its tools and its machines there;
        then runs can be planned.
      </EmptyState>
    );
  }
  return (
    <div className="grid items-start gap-x-9 gap-y-4 rail:grid-cols-[minmax(0,21rem)_minmax(0,1fr)]">
      <div className="min-w-0">
        <PlanFields
          form={form}
          catalogue={catalogue}
          piece={piece}
          onChange={setForm}
          errorOf={(field) => command.fieldErrors[field]}
        />
        {plan ? <Working pieces={pieces ?? 1} plan={plan} parts={parts} /> : null}
      </div>
      <div className="min-w-0 rail:row-span-2">
        <BlendEditor
          form={form}
          colours={stock.data?.colours ?? null}
          error={stock.isError}
          onChange={setForm}
        />
        {need && stock.data && whole ? (
          <BlendStanding parts={parts} need={need} shares={shares} stock={stock.data} />
        ) : null}
        {whole ? null : (
          <p role="status" className="mt-3 font-bold text-warn">
            {shares.length === 0
              ? "Choose the colours of the blend; then it says whether there is enough."
              : `The shares add up to ${sumOfShares(shares) / 10} %; they must make 100 %.`}
          </p>
        )}
        <div className="mt-5 grid gap-3">
          <CommandNotice
            command={command}
            shownFields={["pieceId", "polymer", "toolId", "machineId", "wantedPieces"]}
          />
          <Button
            busy={command.pending}
            disabled={!need || !whole}
            onClick={() => void save()}
            className="justify-self-start"
          >
            {need
              ? `${run ? "Save the plan" : "Keep this plan"}, ${formatKg(need.grams)} kg`
              : "Keep this plan"}
          </Button>
        </div>
      </div>
      <HeatCautions piece={piece} polymer={form.polymer} machine={parts.machine} />
    </div>
  );
}
