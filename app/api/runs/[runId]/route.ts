import { route } from "@/lib/http/route";
import { changePlan } from "@/lib/production/commands/plan-run";
import { changePlanEndpoint } from "@/lib/production/contract/plans";

export const PUT = route(changePlanEndpoint, changePlan);
