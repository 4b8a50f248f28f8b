import { route } from "@/lib/http/route";
import { retirePiece } from "@/lib/production/commands/retire";
import { retirePieceEndpoint } from "@/lib/production/contract/retiring";

export const POST = route(retirePieceEndpoint, retirePiece);
