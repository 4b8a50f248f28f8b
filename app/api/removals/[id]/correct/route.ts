import { route } from "@/lib/http/route";
import { correctRemoval } from "@/lib/removals/commands/correct";
import { correctRemovalEndpoint } from "@/lib/removals/contract/removals";

export const POST = route(correctRemovalEndpoint, correctRemoval);
