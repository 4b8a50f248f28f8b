import { route } from "@/lib/http/route";
import { correctCount } from "@/lib/stock/commands/review-count";
import { correctCountEndpoint } from "@/lib/stock/contract/counts";

export const POST = route(correctCountEndpoint, correctCount);
