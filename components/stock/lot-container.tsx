"use client";

import { useRouter } from "next/navigation";
import { useCommand } from "@/components/forms/use-command";
import { QueryProvider } from "@/components/forms/query-provider";
import { SelectField } from "@/components/ui/select-field";
import { UNANSWERED_SENTENCE } from "@/components/forms/unanswered";
import type { Id } from "@/lib/core/ids";
import type { setLotContainerEndpoint } from "@/lib/stock/contract/lot-care";
import { useDeskLists } from "../weighing/use-desk-lists";
import { CONTAINER } from "./addresses";

type Props = { number: number; containerId: string | null; containerName: string | null };

function Choice({ number, containerId, containerName }: Props) {
  const router = useRouter();
  const lists = useDeskLists();
  const save = useCommand<typeof setLotContainerEndpoint>(CONTAINER);
  const containers = lists.containers.filter(({ kind }) => kind === "container");

  async function choose(id: string) {
    const chosen = id === "" ? null : (id as Id<"container">);
    const result = await save.send({ number, containerId: chosen });
    if (result.kind === "done") router.refresh();
  }

  return (
    <SelectField
      label="Container"
      hint="Its empty weight is taken off when the lot is counted."
      value={containerId ?? ""}
      disabled={save.pending}
      onChange={(event) => void choose(event.target.value)}
      error={save.problem?.detail ?? (save.unreachable ? UNANSWERED_SENTENCE : undefined)}
      className="mt-4"
    >
      <option value="">None that is listed</option>
      {containerId !== null && !containers.some(({ id }) => id === containerId) ? (
        <option value={containerId}>{containerName}</option>
      ) : null}
      {containers.map(({ id, name }) => (
        <option key={id} value={id}>
          {name}
        </option>
      ))}
    </SelectField>
  );
}

/** In which listed container the lot lies. */
export function LotContainer(props: Props) {
  return (
    <QueryProvider>
      <Choice {...props} />
    </QueryProvider>
  );
}
