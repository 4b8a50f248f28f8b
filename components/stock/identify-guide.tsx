import { Notice } from "@/components/ui/notice";
import { Ticket } from "@/components/ui/ticket";
import { POLYMER_NAMES } from "@/lib/core/plastics";
import { DENSITIES, floats } from "@/lib/stock/rules/float-or-sink";

const range = ({ least, most }: { least: number; most: number }): string =>
  least === most ? least.toFixed(2) : `${least.toFixed(2)} to ${most.toFixed(2)}`;

/** Finding out what a piece is, with nothing but eyes, hands and a bowl of water. */
export function IdentifyGuide() {
  return (
    <section className="mt-8 grid gap-4" aria-label="How to find out">
      <h2 className="text-lg">How to find out</h2>
      <Notice tone="bad" title="Never burn a sample">
        The fumes are poisonous, and PVC gives off acid. Nothing here needs a flame. If you are
        still not sure, it stays here.
      </Notice>
      <Ticket as="section" label="Look for the code">
        <h3 className="mb-1 font-bold">1. Look for the code</h3>
        <p>
          A triangle with a number from 1 to 7, mostly on the bottom or inside a lid. 7 is any other
          plastic; a short name such as PLA may stand below. No code on something black: it stays
          here or is turned away.
        </p>
      </Ticket>
      <div>
        <h3 className="mb-1 font-bold">2. Put it into water</h3>
        <p className="mb-2 max-w-[70ch]">
          Cut off a clean piece without a label, wet it, push it under and rub the bubbles off.
          Water weighs 1.00 g/cm³: what is lighter comes up. Foamed plastic floats whatever it is,
          and so does a closed hollow piece.
        </p>
        <table className="w-full max-w-xl border-collapse text-left">
          <caption className="sr-only">What floats and what sinks, lightest first</caption>
          <thead>
            <tr className="border-b-2 border-ink text-xs text-soft">
              <th scope="col" className="py-1.5 pr-3">
                Plastic
              </th>
              <th scope="col" className="py-1.5 pr-3">
                In water
              </th>
              <th scope="col" className="py-1.5 text-right">
                g/cm³
              </th>
            </tr>
          </thead>
          <tbody>
            {DENSITIES.map((row) => {
              const { name, resinCode } = POLYMER_NAMES[row.polymer];
              return (
                <tr key={row.polymer} className="border-b border-rule">
                  <th scope="row" className="py-1.5 pr-3 font-bold">
                    <span className="mr-2 inline-block w-[1ch] font-mono">{resinCode}</span>
                    {name}
                  </th>
                  <td className="py-1.5 pr-3">{floats(row) ? "floats" : "sinks"}</td>
                  <td className="py-1.5 text-right font-mono whitespace-nowrap">{range(row)}</td>
                </tr>
              );
            })}
          </tbody>
        </table>
        <p className="mt-2 max-w-[70ch] text-sm text-soft">
          The widest ranges that ACS Omega 2022, 7(16) 13403, Table 1 and handbooks of makers and
          workshops print for solid plastic without fillers; no limits of a standard. Floats: PP,
          LDPE or HDPE. Sinks: none of the three.
        </p>
      </div>
      <Ticket as="section" label="Bend it">
        <h3 className="mb-1 font-bold">3. Bend it</h3>
        <ul className="list-inside list-disc">
          <li>Soft, waxy, creases white and comes back: LDPE or HDPE.</li>
          <li>Stiff, bends many times without breaking, as a hinge: PP.</li>
          <li>Stiff and snaps with a sharp crack: PS.</li>
          <li>Tough, hardly bends: ABS or PC.</li>
        </ul>
        <p className="mt-1 text-sm text-soft">A hint, never proof. Wear eye protection.</p>
      </Ticket>
    </section>
  );
}
