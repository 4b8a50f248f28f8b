import { route } from "@/lib/http/route";
import { invitePerson } from "@/lib/identity/commands/people";
import { invitePersonEndpoint, listPeopleEndpoint } from "@/lib/identity/contract";
import { listPeople } from "@/lib/identity/queries";

export const GET = route(listPeopleEndpoint, listPeople);
export const POST = route(invitePersonEndpoint, invitePerson);
