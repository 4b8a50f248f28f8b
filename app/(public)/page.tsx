import { FrontPage } from "@/components/shell/front-page";
import { publicContext, shellContext } from "@/lib/http/page-context";
import { getFrontFigures } from "@/lib/reports/queries/front-figures";

export default async function Page() {
  const ctx = await publicContext();
  const { schemeName } = await shellContext();
  return <FrontPage schemeName={schemeName} {...getFrontFigures(ctx)} />;
}
