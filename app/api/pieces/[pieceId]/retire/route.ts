import { route } from "@/lib/http/route";
import { retirePiece } from "@/lib/production/commands/pieces";
import { retirePieceEndpoint } from "@/lib/production/contract/catalogue";

export const POST = route(retirePieceEndpoint, retirePiece);
