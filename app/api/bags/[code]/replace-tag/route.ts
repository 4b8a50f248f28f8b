import { route } from "@/lib/http/route";
import { replaceTag } from "@/lib/bags/commands/spare-tag";
import { replaceTagEndpoint } from "@/lib/bags/contract";

export const POST = route(replaceTagEndpoint, replaceTag);
