import { route } from "@/lib/http/route";
import { giveSpareTag } from "@/lib/bags/commands/spare-tag";
import { giveSpareTagEndpoint } from "@/lib/bags/contract";

export const POST = route(giveSpareTagEndpoint, giveSpareTag);
