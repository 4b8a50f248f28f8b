import type { ReactNode } from "react";

const DRAWN = {
  camera: (
    <>
      <path d="M3 8h4l2-3h6l2 3h4v11H3z" />
      <circle cx="12" cy="13" r="3.5" />
    </>
  ),
  lamp: <path d="M9 21h6M10 18h4v-3c0-1 3-3 3-6a5 5 0 0 0-10 0c0 3 3 5 3 6zM3 9h1M20 9h1M12 1v1" />,
  close: <path d="M5 5l14 14M19 5L5 19" />,
  menu: <path d="M4 7h16M4 12h16M4 17h16" />,
  print: <path d="M7 9V3h10v6M7 17H3V9h18v8h-4M7 14h10v7H7z" />,
  download: <path d="M12 3v12M7 10l5 5 5-5M4 20h16" />,
  add: <path d="M12 4v16M4 12h16" />,
  back: <path d="M15 5l-7 7 7 7" />,
  forward: <path d="M9 5l7 7-7 7" />,
  check: <path d="M4 13l5 5L20 6" />,
} as const satisfies Record<string, ReactNode>;

export type IconName = keyof typeof DRAWN;

type IconProps = {
  name: IconName;
  /** Side in px. */
  size?: number;
  /** Only where no word stands beside it; then it is what a screen reader says. */
  label?: string;
};

/** A few line drawings in the colour of the text around them. */
export function Icon({ name, size = 24, label }: IconProps) {
  return (
    <svg
      viewBox="0 0 24 24"
      width={size}
      height={size}
      role={label ? "img" : undefined}
      aria-label={label}
      aria-hidden={label ? undefined : true}
      className="shrink-0 fill-none stroke-current stroke-2"
      strokeLinecap="square"
    >
      {DRAWN[name]}
    </svg>
  );
}
