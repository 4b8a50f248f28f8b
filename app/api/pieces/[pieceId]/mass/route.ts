import { route } from "@/lib/http/route";
import { weighPieces } from "@/lib/production/commands/pieces";
import { weighPiecesEndpoint } from "@/lib/production/contract/catalogue";

export const POST = route(weighPiecesEndpoint, weighPieces);
