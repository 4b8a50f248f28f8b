import { route } from "@/lib/http/route";
import { openDraft } from "@/lib/sorting/commands/drafts";
import { openDraftEndpoint } from "@/lib/sorting/contract/drafts";

export const POST = route(openDraftEndpoint, openDraft);
