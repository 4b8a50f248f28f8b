import { route } from "@/lib/http/route";
import { reweighContainer } from "@/lib/scales/commands/containers";
import { reweighContainerEndpoint } from "@/lib/scales/contract/containers";

export const POST = route(reweighContainerEndpoint, reweighContainer);
