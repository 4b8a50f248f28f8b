import { ownCookieName } from "@/lib/http/actor";
import { openApiDocument } from "@/lib/http/openapi";
import { openApiEndpoint } from "@/lib/http/own-endpoints";
import { route } from "@/lib/http/route";
import { settings } from "@/lib/platform/env";

export const GET = route(openApiEndpoint, () =>
  openApiDocument(settings().publicUrl, ownCookieName()),
);
