"use client";

import { useState } from "react";
import type { StepView } from "@/lib/stock/contract/steps";
import { NewStep } from "./new-step";
import { draftOf } from "./step-as-draft";

/** The wizard, filled with what a step said. */
export function CorrectStep({ step, helperId }: { step: StepView; helperId: string }) {
  const [correcting] = useState(() => ({
    id: step.stepId,
    draft: draftOf(step),
    occurredAt: step.occurredAt,
  }));
  return <NewStep helperId={helperId} from={null} correcting={correcting} />;
}
