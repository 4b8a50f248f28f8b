import { route } from "@/lib/http/route";
import { giveUpDraft, saveDraft } from "@/lib/sorting/commands/drafts";
import { giveUpDraftEndpoint, saveDraftEndpoint } from "@/lib/sorting/contract/drafts";

export const PUT = route(saveDraftEndpoint, saveDraft);
export const DELETE = route(giveUpDraftEndpoint, giveUpDraft);
