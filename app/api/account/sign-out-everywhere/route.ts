import { route } from "@/lib/http/route";
import { signOutEverywhere } from "@/lib/identity/commands/account";
import { signOutEverywhereEndpoint } from "@/lib/identity/contract";

export const POST = route(signOutEverywhereEndpoint, signOutEverywhere);
