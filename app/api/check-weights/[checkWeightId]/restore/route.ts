import { route } from "@/lib/http/route";
import { restoreCheckWeight } from "@/lib/scales/commands/check-weights";
import { restoreCheckWeightEndpoint } from "@/lib/scales/contract/checks";

export const POST = route(restoreCheckWeightEndpoint, restoreCheckWeight);
