import { route } from "@/lib/http/route";
import { restoreContainer } from "@/lib/scales/commands/containers";
import { restoreContainerEndpoint } from "@/lib/scales/contract/containers";

export const POST = route(restoreContainerEndpoint, restoreContainer);
