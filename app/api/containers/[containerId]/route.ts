import { route } from "@/lib/http/route";
import { changeContainer } from "@/lib/scales/commands/containers";
import { changeContainerEndpoint } from "@/lib/scales/contract/containers";

export const PATCH = route(changeContainerEndpoint, changeContainer);
