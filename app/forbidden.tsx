import { ForbiddenPage } from "@/components/shell/forbidden-page";

export const metadata = { title: "No permission" };

export default function Forbidden() {
  return <ForbiddenPage />;
}
