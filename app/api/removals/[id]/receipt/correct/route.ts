import { route } from "@/lib/http/route";
import { correctReceipt } from "@/lib/removals/commands/correct";
import { correctReceiptEndpoint } from "@/lib/removals/contract/receipts";

export const POST = route(correctReceiptEndpoint, correctReceipt);
