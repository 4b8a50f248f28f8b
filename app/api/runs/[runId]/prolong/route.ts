import { route } from "@/lib/http/route";
import { prolong } from "@/lib/production/commands/reserve";
import { prolongEndpoint } from "@/lib/production/contract/reservations";

export const POST = route(prolongEndpoint, prolong);
