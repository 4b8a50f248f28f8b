import { Notice } from "@/components/ui/notice";
import type { QrSize, QrSymbol } from "@/lib/bags/rules/qr";

type SymbolNoticesProps = {
  symbol: Pick<QrSymbol, "alphanumeric" | "version">;
  qr: QrSize;
  publicUrl: string;
};

/** What makes symbols larger than they need be, or useless: the program's address. */
export function SymbolNotices({ symbol, qr, publicUrl }: SymbolNoticesProps) {
  const host = new URL(publicUrl).hostname;
  return (
    <div className="mb-5 grid gap-3 empty:hidden print:hidden">
      {host === "localhost" || host === "127.0.0.1" ? (
        <Notice tone="warn" title="These open on this machine only">
          The symbols hold {publicUrl}, which no phone can reach. Set PUBLIC_URL before you print
          for bags.
        </Notice>
      ) : null}
      {symbol.alphanumeric ? null : (
        <Notice tone="warn" title="The symbols are larger than they need be">
          A sign in {publicUrl} has no place in the small kind of symbol. An address of letters,
          figures, dots and hyphens gives smaller ones.
        </Notice>
      )}
      {qr.grown ? (
        <Notice tone="warn" title={`The symbols are ${qr.symbolMm.toFixed(1)} mm wide`}>
          {publicUrl} is long: it needs a symbol of version {symbol.version}, which would be too
          fine at 30 mm. A shorter PUBLIC_URL gives tags that scan from farther away.
        </Notice>
      ) : null}
    </div>
  );
}
