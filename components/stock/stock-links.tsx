import Link from "next/link";

const LINKS = [
  { href: "/stock/lots", label: "All lots" },
  { href: "/stock/not-sure", label: "Not sure" },
  { href: "/steps", label: "Steps" },
] as const;

/** Where else the stock is worked on. */
export function StockLinks() {
  return (
    <nav aria-label="Of the stock" className="mb-3 flex flex-wrap gap-x-6">
      {LINKS.map(({ href, label }) => (
        <Link key={href} href={href} className="link inline-flex min-h-11 items-center font-bold">
          {label}
        </Link>
      ))}
    </nav>
  );
}
