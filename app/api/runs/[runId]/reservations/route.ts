import { route } from "@/lib/http/route";
import { reserve } from "@/lib/production/commands/reserve";
import { reserveEndpoint } from "@/lib/production/contract/reservations";

export const POST = route(reserveEndpoint, reserve);
