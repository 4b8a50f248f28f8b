import { route } from "@/lib/http/route";
import { acceptReading } from "@/lib/weighing/commands/correct";
import { acceptReadingEndpoint } from "@/lib/weighing/contract/corrections";

export const POST = route(acceptReadingEndpoint, acceptReading);
