import { route } from "@/lib/http/route";
import { enterReceipt } from "@/lib/removals/commands/receipts";
import { enterReceiptEndpoint } from "@/lib/removals/contract/receipts";

export const POST = route(enterReceiptEndpoint, enterReceipt);
