import { authRoute } from "@/lib/http/auth-route";

export { authRoute as GET, authRoute as POST };
