import { NotFoundPage } from "@/components/shell/not-found-page";

export const metadata = { title: "Not found" };

export default function NotFound() {
  return <NotFoundPage />;
}
