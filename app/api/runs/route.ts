import { route } from "@/lib/http/route";
import { planRun } from "@/lib/production/commands/plan-run";
import { listRunsEndpoint, planRunEndpoint } from "@/lib/production/contract/plans";
import { listRuns } from "@/lib/production/queries/runs";

export const GET = route(listRunsEndpoint, listRuns);
export const POST = route(planRunEndpoint, planRun);
