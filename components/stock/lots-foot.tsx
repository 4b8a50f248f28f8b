import Link from "next/link";

type Props = {
  /** What is searched for, as the address says it. */
  values: Readonly<Record<string, string>>;
  next: number | null;
  numbers: readonly number[];
};

/** The next page of lots, and the labels of this one. */
export function LotsFoot({ values, next, numbers }: Props) {
  const link = "link inline-flex min-h-11 items-center font-bold";
  return (
    <p className="mt-4 flex flex-wrap gap-x-6">
      {next === null ? null : (
        <Link
          href={{ pathname: "/stock/lots", query: { ...values, after: String(next) } }}
          className={link}
        >
          Later lots
        </Link>
      )}
      {numbers.length === 0 ? null : (
        <Link
          href={{ pathname: "/stock/lots/labels", query: { lots: numbers.join(".") } }}
          className={link}
        >
          Print labels of these lots
        </Link>
      )}
    </p>
  );
}
