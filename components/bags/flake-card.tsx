import { seedOf } from "@/lib/core/random";
import type { ReactNode } from "react";

import { Flakes } from "@/components/ui/flakes";

type FlakeCardProps = {
  /** The code: every bag has flakes of its own. */
  seed: string;
  children: ReactNode;
};

/** A card that lies in a heap of flakes: a tag's public page. */
export function FlakeCard({ seed, children }: FlakeCardProps) {
  return (
    <>
      <Flakes
        seed={seedOf(seed)}
        width={1280}
        height={200}
        count={330}
        largest={30}
        keep="xMidYMid slice"
        className="-mx-4 h-44 w-[calc(100%+2rem)] max-w-none wide:-mx-12 wide:w-[calc(100%+6rem)]"
      />
      <div className="mx-auto -mt-11 w-full max-w-lg rounded-ticket border border-rule bg-card px-5 pt-6 pb-5">
        {children}
      </div>
    </>
  );
}
