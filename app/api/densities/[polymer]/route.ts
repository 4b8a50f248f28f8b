import { route } from "@/lib/http/route";
import { setDensity } from "@/lib/production/commands/machines";
import { setDensityEndpoint } from "@/lib/production/contract/catalogue";

export const PUT = route(setDensityEndpoint, setDensity);
