import { route } from "@/lib/http/route";
import { listPhotosEndpoint } from "@/lib/uploads/contract";
import { listPhotos } from "@/lib/uploads/queries/photos";

export const GET = route(listPhotosEndpoint, listPhotos);
