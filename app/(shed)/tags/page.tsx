import type { Metadata } from "next";
import Link from "next/link";
import { OrderForm } from "@/components/bags/order-form";
import { TagOrders } from "@/components/bags/tag-orders";
import { PageHeader } from "@/components/ui/page-header";
import { Ticket } from "@/components/ui/ticket";
import { countSpareTags, listTagOrders, ORDERS_PER_PAGE } from "@/lib/bags/queries";
import { idSchema } from "@/lib/core/schemas";
import { pageContext } from "@/lib/http/page-context";
import { requireScheme } from "@/lib/platform/scheme";
import { listPoints } from "@/lib/points/queries";

export const metadata: Metadata = { title: "Tags" };

const orderIdSchema = idSchema<"tag-order">();

type Props = { searchParams: Promise<Record<string, unknown>> };

export default async function TagsPage({ searchParams }: Props) {
  const ctx = await pageContext("tags.order");
  const after = orderIdSchema.safeParse((await searchParams).after);
  const orders = listTagOrders(ctx, after.data);
  const spares = countSpareTags(ctx);
  const points = listPoints(ctx).items.filter((point) => !point.builtIn);
  return (
    <>
      <PageHeader
        title="Tags"
        titleInBar
        lead={
          spares === 0
            ? "Every bag carries one. There is no spare tag for bags that come without."
            : `Every bag carries one. ${spares} spare ${spares === 1 ? "tag is" : "tags are"} left for bags that come without.`
        }
      />
      <div className="grid items-start gap-6 rail:grid-cols-[20rem_minmax(0,1fr)]">
        <div className="grid gap-3">
          <Ticket as="section" label="Order tags">
            <h2 className="mb-3 text-xl">Order tags</h2>
            <OrderForm points={points.map(({ id, name }) => ({ id, name }))} />
          </Ticket>
          <p className="text-sm text-soft">
            Prints beside the mark?{" "}
            <Link href="/tags/calibration" className="link font-bold">
              Calibrate the printer
            </Link>
          </p>
        </div>
        <TagOrders
          orders={orders}
          zone={requireScheme(ctx.db.reader).timeZone}
          olderAfter={orders.length === ORDERS_PER_PAGE ? (orders.at(-1)?.id ?? null) : null}
        />
      </div>
    </>
  );
}
