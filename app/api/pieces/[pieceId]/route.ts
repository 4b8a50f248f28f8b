import { route } from "@/lib/http/route";
import { changePiece } from "@/lib/production/commands/pieces";
import { changePieceEndpoint } from "@/lib/production/contract/catalogue";

export const PUT = route(changePieceEndpoint, changePiece);
