import { ForbiddenPage } from "@/components/shell/forbidden-page";

export default function Forbidden() {
  return <ForbiddenPage inFrame />;
}
