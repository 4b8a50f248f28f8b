type SkeletonProps = {
  /** The shape of what comes. */
  shape: "lines" | "tickets" | "table" | "tiles" | "wells";
  count?: number;
  /** Said aloud: "Loading the stock". */
  label?: string;
};

const SHAPES = {
  lines: { frame: "grid gap-3", part: "h-5 rounded-plate odd:w-4/5 bg-well", count: 4 },
  tickets: {
    frame: "grid gap-2.5",
    part: "h-24 rounded-ticket border border-rule bg-card",
    count: 4,
  },
  table: {
    frame: "grid overflow-hidden rounded-ticket border border-rule bg-card",
    part: "h-12 border-rule not-last:border-b first:bg-well",
    count: 8,
  },
  tiles: { frame: "grid grid-cols-4 gap-2", part: "h-16 rounded-control bg-well", count: 8 },
  wells: {
    frame: "grid grid-cols-3 gap-1.5 wide:grid-cols-8",
    part: "h-26 rounded-control bg-well",
    count: 24,
  },
} as const;

/** What stands in for content on its way. It appears after 200 ms, so that a quick answer shows no flicker. */
export function Skeleton({ shape, count, label = "Loading" }: SkeletonProps) {
  const { frame, part, count: usual } = SHAPES[shape];
  return (
    <div role="status" className="animate-appear">
      <span className="sr-only">{label}</span>
      <div aria-hidden className={frame}>
        {Array.from({ length: count ?? usual }, (_, at) => (
          <span key={at} className={`block ${part}`} />
        ))}
      </div>
    </div>
  );
}
