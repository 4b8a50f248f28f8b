import { route } from "@/lib/http/route";
import { addPiece } from "@/lib/production/commands/pieces";
import { addPieceEndpoint } from "@/lib/production/contract/catalogue";

export const POST = route(addPieceEndpoint, addPiece);
