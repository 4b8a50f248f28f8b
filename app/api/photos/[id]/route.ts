import { route, streamRoute } from "@/lib/http/route";
import { servePhoto } from "@/lib/http/serve-photo";
import { removePhoto } from "@/lib/uploads/commands/remove-photo";
import { photoFileEndpoint, removePhotoEndpoint } from "@/lib/uploads/contract";

export const GET = streamRoute(photoFileEndpoint, servePhoto);
export const DELETE = route(removePhotoEndpoint, (ctx, input) => removePhoto(ctx, input));
