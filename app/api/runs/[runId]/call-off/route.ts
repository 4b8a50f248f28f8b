import { route } from "@/lib/http/route";
import { callOffRun } from "@/lib/production/commands/plan-run";
import { callOffRunEndpoint } from "@/lib/production/contract/plans";

export const POST = route(callOffRunEndpoint, callOffRun);
