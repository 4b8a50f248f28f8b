import { route } from "@/lib/http/route";
import { getCatalogueEndpoint } from "@/lib/production/contract/catalogue";
import { getCatalogue } from "@/lib/production/queries/catalogue";

export const GET = route(getCatalogueEndpoint, getCatalogue);
