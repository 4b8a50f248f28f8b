import type * as z from "zod";
import type { weighInEndpoint } from "@/lib/weighing/contract/weigh-ins";

/** What the weigh-in endpoint takes, before its defaults. */
export type WeighInEndpointInput = z.input<typeof weighInEndpoint.input>;
