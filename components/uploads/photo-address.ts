import { endpointUrl, type AddressOf } from "@/components/forms/fetch-endpoint";
import type { photoFileEndpoint } from "@/lib/uploads/contract";
import type { PHOTO_SIZES } from "@/lib/uploads/terms";

const FILE: AddressOf<typeof photoFileEndpoint> = { method: "GET", path: "/api/photos/{id}" };

/** Where one picture is read. */
export function photoAddress(id: string, size: (typeof PHOTO_SIZES)[number]): string {
  return endpointUrl<typeof photoFileEndpoint>(FILE, { id, size });
}
