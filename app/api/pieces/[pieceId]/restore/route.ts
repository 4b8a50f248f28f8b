import { route } from "@/lib/http/route";
import { restorePiece } from "@/lib/production/commands/retire";
import { restorePieceEndpoint } from "@/lib/production/contract/retiring";

export const POST = route(restorePieceEndpoint, restorePiece);
