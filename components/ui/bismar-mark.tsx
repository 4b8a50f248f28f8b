/** The mark: a hand balance with its weight at one end and a pail of flakes at the other. Decorative. */
export function BismarMark({ width = 32 }: { width?: number }) {
  return (
    <svg
      aria-hidden
      viewBox="0 0 32 26"
      width={width}
      height={(width * 26) / 32}
      className="shrink-0"
    >
      <path
        d="M6 10.5H29.5M13 3v7.5M24.5 10.5V14"
        className="fill-none stroke-ink"
        strokeWidth="2.4"
        strokeLinecap="round"
      />
      <circle cx="5" cy="10.5" r="5" className="fill-ink" />
      <path
        d="M19.5 15.2h10.2l-1.7 9h-6.8z"
        className="fill-flake-yellow stroke-ink"
        strokeWidth="2.2"
        strokeLinejoin="round"
      />
    </svg>
  );
}
