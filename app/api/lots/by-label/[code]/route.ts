import { route } from "@/lib/http/route";
import { lotByLabelEndpoint } from "@/lib/stock/contract/lot-care";
import { getLotByLabel } from "@/lib/stock/queries/lot-label";

export const GET = route(lotByLabelEndpoint, getLotByLabel);
