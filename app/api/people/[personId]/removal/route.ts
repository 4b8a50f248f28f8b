import { route } from "@/lib/http/route";
import { removePerson } from "@/lib/identity/commands/people";
import { removePersonEndpoint } from "@/lib/identity/contract";

export const POST = route(removePersonEndpoint, removePerson);
