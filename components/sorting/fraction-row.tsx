import { PileSwatch } from "@/components/ui/pile-swatch";
import type { SwatchPattern } from "@/components/ui/swatch-paint";

type Props = {
  name: string;
  detail: string;
  /** Formatted; null while its weight cannot be read. */
  kg: string | null;
  hex: string | null;
  pattern: SwatchPattern;
  seed: number;
  error?: string | undefined;
  /** Opens it again; without it the row is only shown. */
  onOpen?: () => void;
};

/** One pile or reject of a sorting. */
export function FractionRow({ name, detail, kg, hex, pattern, seed, error, onOpen }: Props) {
  const content = (
    <>
      <PileSwatch hex={hex} pattern={pattern} seed={seed} />
      <span className="min-w-0 grow">
        <span className="block font-bold">{name}</span>
        <span className="block text-sm text-soft">{detail}</span>
        {error ? <span className="block text-sm font-bold text-bad">{error}</span> : null}
      </span>
      <span className="font-mono text-lg font-bold whitespace-nowrap">
        {kg ?? "–"}
        <span className="sr-only"> kg</span>
      </span>
    </>
  );
  const shape = "flex w-full items-center gap-3 px-4 py-2.5 text-left";
  return (
    <li className="border-b border-rule last:border-0">
      {onOpen ? (
        <button type="button" onClick={onOpen} className={`${shape} hover:bg-well`}>
          {content}
        </button>
      ) : (
        <div className={shape}>{content}</div>
      )}
    </li>
  );
}
