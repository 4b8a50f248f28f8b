import { route } from "@/lib/http/route";
import { resendInvite } from "@/lib/identity/commands/people";
import { resendInviteEndpoint } from "@/lib/identity/contract";

export const POST = route(resendInviteEndpoint, resendInvite);
