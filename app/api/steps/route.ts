import { route } from "@/lib/http/route";
import { saveStep } from "@/lib/stock/commands/save-step";
import { listStepsEndpoint, saveStepEndpoint } from "@/lib/stock/contract/steps";
import { listSteps } from "@/lib/stock/queries/steps";

export const GET = route(listStepsEndpoint, listSteps);
export const POST = route(saveStepEndpoint, saveStep);
