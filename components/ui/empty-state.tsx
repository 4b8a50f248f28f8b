import type { ReactNode } from "react";
import { Flakes } from "./flakes";

type EmptyStateProps = {
  title: ReactNode;
  /** What will stand here and what to do first. */
  children?: ReactNode;
  action?: ReactNode;
  seed?: number;
  as?: "h2" | "h3" | "p";
};

/** Nothing here yet: says what comes, what to do first, and shows a handful of flakes. */
export function EmptyState({
  title,
  children,
  action,
  seed = 7,
  as: Title = "h2",
}: EmptyStateProps) {
  return (
    <div className="flex flex-col items-center gap-2 rounded-ticket border-2 border-dashed border-rule px-5 py-8 text-center">
      <Flakes
        seed={seed}
        width={220}
        height={72}
        count={34}
        thickest="floor"
        largest={15}
        keep="xMidYMid meet"
        className="h-18 w-55 max-w-full overflow-visible"
      />
      <Title className="mt-2 font-heading text-xl font-bold">{title}</Title>
      {children ? <div className="max-w-[52ch] text-soft">{children}</div> : null}
      {action ? <div className="mt-3 flex flex-wrap justify-center gap-2.5">{action}</div> : null}
    </div>
  );
}
