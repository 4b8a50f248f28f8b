import type { Metadata } from "next";
import { PointsManager } from "@/components/points/points-manager";
import { pageContext } from "@/lib/http/page-context";
import { listManagedPoints } from "@/lib/points/queries";

export const metadata: Metadata = { title: "Drop-off points" };

export default async function ManagePointsPage() {
  const points = listManagedPoints(await pageContext("points.manage"));
  return (
    <PointsManager
      points={points.map(({ id, name, kind, closedAt }) => ({ id, name, kind, closedAt }))}
    />
  );
}
