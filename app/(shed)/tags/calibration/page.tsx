import type { Metadata } from "next";
import { CalibrationSheets } from "@/components/bags/calibration-sheets";
import { PageHeader } from "@/components/ui/page-header";
import { typedSettings } from "@/lib/bags/rules/tag-sheet";
import { pageContext } from "@/lib/http/page-context";

export const metadata: Metadata = { title: "Calibrate the printer" };

type Props = { searchParams: Promise<Record<string, unknown>> };

export default async function CalibrationPage({ searchParams }: Props) {
  await pageContext("tags.order");
  return (
    <>
      <PageHeader
        title="Calibrate the printer"
        lead="Most printers print a little beside the mark. Find out how far, once for each kind of sheet; this browser keeps it."
        back={{ href: "/tags", label: "Tags" }}
      />
      <CalibrationSheets initial={typedSettings(await searchParams)} />
    </>
  );
}
