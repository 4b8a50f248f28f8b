/** Sessions under way as the server keeps them. */
import { ProblemError, UnreachableError } from "@/components/forms/problem-document";
import { fillPath, type AddressOf } from "@/components/forms/fetch-endpoint";
import { sendRequest } from "@/components/forms/send-request";
import type { ProblemDocument } from "@/lib/core/errors";
import type {
  giveUpDraftEndpoint,
  openDraftEndpoint,
  saveDraftEndpoint,
  SortingDraft,
} from "@/lib/sorting/contract/drafts";
import { draftText, type Table } from "./table-text";

const OPEN: AddressOf<typeof openDraftEndpoint> = {
  method: "POST",
  path: "/api/sortings/drafts/{id}/open",
};
const KEEP: AddressOf<typeof saveDraftEndpoint> = {
  method: "PUT",
  path: "/api/sortings/drafts/{id}",
};
const GIVE_UP: AddressOf<typeof giveUpDraftEndpoint> = {
  method: "DELETE",
  path: "/api/sortings/drafts/{id}",
};

export type Answer<Done> =
  | { kind: "done"; answer: Done }
  | { kind: "refused"; problem: ProblemDocument }
  | { kind: "unreachable" };

async function ask<Done>(
  { method, path }: { method: string; path: string },
  id: string,
  body: Readonly<Record<string, unknown>>,
): Promise<Answer<Done>> {
  try {
    const answer = await sendRequest(method, fillPath(path, { id }).path, JSON.stringify(body));
    return { kind: "done", answer: answer as Done };
  } catch (error) {
    if (error instanceof ProblemError) return { kind: "refused", problem: error.problem };
    if (error instanceof UnreachableError) return { kind: "unreachable" };
    throw error;
  }
}

/** The draft, and that it is open here. */
export function openDraft(id: string): Promise<Answer<SortingDraft>> {
  return ask(OPEN, id, {});
}

/** @param version the one that the table builds on */
export function keepDraft(
  id: string,
  version: number,
  { codes, draft }: Table,
): Promise<Answer<SortingDraft>> {
  return ask(KEEP, id, { version, codes, content: draftText(draft) });
}

export function giveUpDraft(id: string, version: number): Promise<Answer<{ id: string }>> {
  return ask(GIVE_UP, id, { version });
}
