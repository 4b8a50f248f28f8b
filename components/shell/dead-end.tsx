import type { ReactNode } from "react";
import { BismarMark } from "@/components/ui/bismar-mark";
import { Flakes } from "@/components/ui/flakes";
import { Ticket } from "@/components/ui/ticket";

type DeadEndProps = {
  title: string;
  seed: number;
  /** What is wrong and what was kept. */
  children: ReactNode;
  actions: ReactNode;
  /** A frame around it has the page's `main` already. */
  inFrame?: boolean;
  /** Under the tear line: the number to quote. */
  reference?: ReactNode;
};

/** A page that stands for another: not found, no permission, failed. It says what to do next. */
export function DeadEnd({
  title,
  seed,
  children,
  actions,
  inFrame = false,
  reference,
}: DeadEndProps) {
  const words = (
    <div className="py-1">
      <BismarMark />
      <h1 className="mt-4 text-2xl">{title}</h1>
      <div className="mt-3 text-base text-soft">{children}</div>
      <div className="mt-5 flex flex-wrap gap-2.5 max-wide:*:grow">{actions}</div>
    </div>
  );
  const Main = inFrame ? "div" : "main";
  return (
    <Main
      className={`relative isolate flex grow flex-col items-center pt-32 pb-10 wide:pt-40 ${inFrame ? "" : "px-4"}`}
    >
      <Flakes
        seed={seed}
        width={900}
        height={220}
        count={150}
        largest={26}
        keep="xMidYMid slice"
        className="absolute top-0 left-1/2 -z-10 h-44 w-screen max-w-none -translate-x-1/2 wide:h-52 rail:w-full rail:overflow-visible"
      />
      {reference ? (
        <Ticket className="w-full max-w-lg" stub={words}>
          {reference}
        </Ticket>
      ) : (
        <Ticket className="w-full max-w-lg">{words}</Ticket>
      )}
    </Main>
  );
}
