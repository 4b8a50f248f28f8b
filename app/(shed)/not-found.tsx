import { NotFoundPage } from "@/components/shell/not-found-page";

export default function NotFound() {
  return <NotFoundPage inFrame />;
}
