import { searchAuditEndpoint } from "@/lib/audit/contract";
import { searchAudit } from "@/lib/audit/queries";
import { route } from "@/lib/http/route";

export const GET = route(searchAuditEndpoint, searchAudit);
