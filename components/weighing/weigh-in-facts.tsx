import Link from "next/link";
import { formatKg, formatMilligrams, gramsFromMilligrams } from "@/lib/core/mass";
import { KIND_NAMES, POLYMER_NAMES } from "@/lib/core/plastics";
import { BASIS_NAMES } from "@/lib/ledger/terms";
import { instant } from "@/lib/core/time";
import { tareMilligrams } from "@/lib/scales/rules/reading";
import type { WeighInPage } from "@/lib/weighing/contract/corrections";
import { whenWords } from "@/lib/weighing/rules";
import { CONDITION_NAMES } from "@/lib/weighing/terms";

type Props = { weighIn: WeighInPage; timeZone: string };

/** "2.310 kg − 0.150 kg = 2.160 kg" of each reading, and every answer. */
export function WeighInFacts({ weighIn, timeZone }: Props) {
  const { readings, polymer, kind, colourName, condition, oneKind, lotNumber } = weighIn;
  const rows: [string, React.ReactNode][] = [
    ...readings.map((reading, at): [string, React.ReactNode] => {
      const tare = tareMilligrams(reading);
      return [
        readings.length > 1 ? `Reading ${at + 1}` : "Reading",
        <span key="reading" className="font-mono tracking-tighter">
          {formatMilligrams(reading.grossMilligrams)}
          {tare > 0 ? (
            <>
              {" "}
              − {formatMilligrams(tare)} ={" "}
              {formatKg(gramsFromMilligrams(reading.grossMilligrams - tare))}
            </>
          ) : null}{" "}
          <span className="font-body tracking-normal">kg</span>
        </span>,
      ];
    }),
    ["Scale", weighIn.scaleName],
    ["Weight is", BASIS_NAMES[weighIn.basis]],
    ...(weighIn.belowMinimum
      ? ([["Mark", "Under the scale’s minimum"]] satisfies [string, string][])
      : []),
    ["Likely", POLYMER_NAMES[polymer].name],
    ["Colour", colourName ?? "Not said"],
    ["Condition", CONDITION_NAMES[condition]],
    [
      "One kind",
      oneKind ? (
        <>
          Yes{kind === null ? "" : `, ${KIND_NAMES[kind].toLowerCase()}`}
          {lotNumber === null ? null : (
            <>
              , into{" "}
              <Link href={`/stock/lots/${lotNumber}`} className="link font-bold">
                lot {lotNumber}
              </Link>
            </>
          )}
        </>
      ) : (
        "No, to be sorted"
      ),
    ],
    ["Written down", whenWords(instant(weighIn.recordedAt), timeZone)],
  ];
  return (
    <dl className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-5 gap-y-1.5">
      {rows.map(([name, value]) => (
        <div key={name} className="col-span-2 grid grid-cols-subgrid items-baseline">
          <dt className="text-sm text-soft">{name}</dt>
          <dd className="text-right wide:text-left">{value}</dd>
        </div>
      ))}
    </dl>
  );
}
