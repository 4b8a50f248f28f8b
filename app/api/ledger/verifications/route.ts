import { requestVerification } from "@/lib/ledger/commands/verify";
import { lastVerificationEndpoint, verifyEndpoint } from "@/lib/ledger/contract";
import { getLastVerification } from "@/lib/ledger/queries/last-verification";
import { route } from "@/lib/http/route";

export const GET = route(lastVerificationEndpoint, getLastVerification);
export const POST = route(verifyEndpoint, requestVerification);
