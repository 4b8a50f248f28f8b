import { uploadRoute } from "@/lib/http/upload-route";

export { uploadRoute as GET, uploadRoute as POST };
