import { route } from "@/lib/http/route";
import { rejectReasonsEndpoint } from "@/lib/sorting/contract/sortings";
import { listRejectReasons } from "@/lib/sorting/queries/reasons";

export const GET = route(rejectReasonsEndpoint, listRejectReasons);
