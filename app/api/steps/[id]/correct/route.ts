import { route } from "@/lib/http/route";
import { correctStep } from "@/lib/stock/commands/correct-step";
import { correctStepEndpoint } from "@/lib/stock/contract/steps";

export const POST = route(correctStepEndpoint, correctStep);
