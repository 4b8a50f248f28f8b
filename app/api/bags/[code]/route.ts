import { route } from "@/lib/http/route";
import { scannedEndpoint } from "@/lib/weighing/contract";
import { getScanned } from "@/lib/weighing/queries";

export const GET = route(scannedEndpoint, getScanned);
