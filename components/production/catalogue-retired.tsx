import { formatDay, type Day } from "@/lib/core/time";

type Props = { retired: readonly { id: string; name: string; day: Day }[] };

/** What left the catalogue, out of the way: past runs still name it. */
export function CatalogueRetired({ retired }: Props) {
  if (retired.length === 0) return null;
  return (
    <details className="text-sm text-soft print:hidden">
      <summary className="inline-flex min-h-11 cursor-pointer items-center font-bold">
        Retired: {retired.length}
      </summary>
      <ul className="grid gap-1 pb-2">
        {retired.map(({ id, name, day }) => (
          <li key={id} className="wrap-anywhere">
            {name}, {formatDay(day)}
          </li>
        ))}
      </ul>
    </details>
  );
}
