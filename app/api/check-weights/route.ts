import { route } from "@/lib/http/route";
import { addCheckWeight } from "@/lib/scales/commands/check-weights";
import { addCheckWeightEndpoint, listCheckWeightsEndpoint } from "@/lib/scales/contract/checks";
import { listCheckWeights } from "@/lib/scales/queries/check-weights";

export const GET = route(listCheckWeightsEndpoint, listCheckWeights);
export const POST = route(addCheckWeightEndpoint, addCheckWeight);
