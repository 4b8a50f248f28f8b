import { route } from "@/lib/http/route";
import { getAccountEndpoint } from "@/lib/identity/contract";
import { getAccount } from "@/lib/identity/queries";

export const GET = route(getAccountEndpoint, getAccount);
