import { route } from "@/lib/http/route";
import { discardReading } from "@/lib/weighing/commands/discard";
import { discardReadingEndpoint } from "@/lib/weighing/contract/corrections";

export const POST = route(discardReadingEndpoint, discardReading);
