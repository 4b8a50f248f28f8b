import { UnknownTag } from "@/components/bags/unknown-tag";

export default function TagNotFound() {
  return <UnknownTag />;
}
