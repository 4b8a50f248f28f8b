import { route } from "@/lib/http/route";
import { retireCheckWeight } from "@/lib/scales/commands/check-weights";
import { retireCheckWeightEndpoint } from "@/lib/scales/contract/checks";

export const POST = route(retireCheckWeightEndpoint, retireCheckWeight);
