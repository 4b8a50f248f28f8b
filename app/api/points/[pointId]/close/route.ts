import { route } from "@/lib/http/route";
import { closePoint } from "@/lib/points/commands";
import { closePointEndpoint } from "@/lib/points/contract";

export const POST = route(closePointEndpoint, closePoint);
