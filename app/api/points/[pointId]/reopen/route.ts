import { route } from "@/lib/http/route";
import { reopenPoint } from "@/lib/points/commands";
import { reopenPointEndpoint } from "@/lib/points/contract";

export const POST = route(reopenPointEndpoint, reopenPoint);
