"use client";

import type { ComponentProps } from "react";
import { QueryProvider } from "@/components/forms/query-provider";
import { StepWizard } from "./step-wizard";

/** The wizard with what it reads from the server. */
export function NewStep(props: ComponentProps<typeof StepWizard>) {
  return (
    <QueryProvider>
      <StepWizard {...props} />
    </QueryProvider>
  );
}
