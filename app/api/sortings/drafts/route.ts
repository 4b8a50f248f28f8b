import { route } from "@/lib/http/route";
import { listDraftsEndpoint } from "@/lib/sorting/contract/drafts";
import { listDrafts } from "@/lib/sorting/queries/drafts";

export const GET = route(listDraftsEndpoint, listDrafts);
