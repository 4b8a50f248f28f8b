import { route } from "@/lib/http/route";
import { listForReviewEndpoint } from "@/lib/weighing/contract/corrections";
import { listForReview } from "@/lib/weighing/queries/stored";

export const GET = route(listForReviewEndpoint, listForReview);
