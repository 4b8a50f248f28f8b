import { route } from "@/lib/http/route";
import { addContainer } from "@/lib/scales/commands/containers";
import { addContainerEndpoint, listContainersEndpoint } from "@/lib/scales/contract/containers";
import { listContainers } from "@/lib/scales/queries/scales";

export const GET = route(listContainersEndpoint, listContainers);
export const POST = route(addContainerEndpoint, addContainer);
