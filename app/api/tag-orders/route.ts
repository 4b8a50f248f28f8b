import { route } from "@/lib/http/route";
import { orderTags } from "@/lib/bags/commands/order-tags";
import { orderTagsEndpoint } from "@/lib/bags/contract";

export const POST = route(orderTagsEndpoint, orderTags);
