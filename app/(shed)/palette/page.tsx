import type { Metadata } from "next";
import { PaletteManager } from "@/components/stock/palette-manager";
import { pageContext } from "@/lib/http/page-context";
import { listColours } from "@/lib/stock/queries/palette";

export const metadata: Metadata = { title: "Palette" };

export default async function PalettePage() {
  const { items } = listColours(await pageContext("palette.manage"));
  return <PaletteManager colours={items} />;
}
