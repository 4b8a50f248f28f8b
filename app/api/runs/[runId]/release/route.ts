import { route } from "@/lib/http/route";
import { release } from "@/lib/production/commands/reserve";
import { releaseEndpoint } from "@/lib/production/contract/reservations";

export const POST = route(releaseEndpoint, release);
