import { route } from "@/lib/http/route";
import { acceptCount } from "@/lib/stock/commands/review-count";
import { acceptCountEndpoint } from "@/lib/stock/contract/counts";

export const POST = route(acceptCountEndpoint, acceptCount);
