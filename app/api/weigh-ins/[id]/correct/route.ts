import { route } from "@/lib/http/route";
import { correctWeighIn } from "@/lib/weighing/commands/correct";
import { correctWeighInEndpoint } from "@/lib/weighing/contract/corrections";

export const POST = route(correctWeighInEndpoint, correctWeighIn);
