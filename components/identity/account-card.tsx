import type { ReactNode } from "react";
import { Ticket } from "@/components/ui/ticket";

/** The narrow card that the pages about signing in stand on: one heading, one thing to do. */
export function AccountCard({ title, children }: { title: string; children: ReactNode }) {
  return (
    <div className="mx-auto w-full max-w-md pt-4 wide:pt-12">
      <h1 className="mb-4 text-2xl wide:text-3xl">{title}</h1>
      <Ticket>{children}</Ticket>
    </div>
  );
}
