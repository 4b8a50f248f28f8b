import { route } from "@/lib/http/route";
import { undoReceipt } from "@/lib/removals/commands/receipts";
import { undoReceiptEndpoint } from "@/lib/removals/contract/receipts";

export const POST = route(undoReceiptEndpoint, undoReceipt);
