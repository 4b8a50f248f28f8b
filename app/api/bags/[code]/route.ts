import { route } from "@/lib/http/route";
import { scannedEndpoint } from "@/lib/weighing/contract/weigh-ins";
import { getScanned } from "@/lib/weighing/queries/weigh-ins";

export const GET = route(scannedEndpoint, getScanned);
