import { route } from "@/lib/http/route";
import { takeAway } from "@/lib/removals/commands/take-away";
import { takeAwayEndpoint } from "@/lib/removals/contract/removals";

export const POST = route(takeAwayEndpoint, takeAway);
