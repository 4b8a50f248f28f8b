import { route } from "@/lib/http/route";
import { countsToReviewEndpoint } from "@/lib/stock/contract/counts";
import { listCountsToReview } from "@/lib/stock/queries/counts";

export const GET = route(countsToReviewEndpoint, listCountsToReview);
