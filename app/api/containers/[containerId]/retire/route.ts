import { route } from "@/lib/http/route";
import { retireContainer } from "@/lib/scales/commands/containers";
import { retireContainerEndpoint } from "@/lib/scales/contract/containers";

export const POST = route(retireContainerEndpoint, retireContainer);
