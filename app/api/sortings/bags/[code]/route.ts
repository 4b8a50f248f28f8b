import { route } from "@/lib/http/route";
import { bagToSortEndpoint } from "@/lib/sorting/contract/sortings";
import { getBagToSort } from "@/lib/sorting/queries/bag-to-sort";

export const GET = route(bagToSortEndpoint, getBagToSort);
