"use client";

import { useState } from "react";
import type { StepView } from "@/lib/stock/contract/steps";
import { NewStep } from "./new-step";
import { draftOf } from "./step-as-draft";

type Props = { step: StepView; helperId: string; timeZone: string };

/** The wizard, filled with what a step said. */
export function CorrectStep({ step, helperId, timeZone }: Props) {
  const [correcting] = useState(() => ({
    id: step.stepId,
    draft: draftOf(step),
    occurredAt: step.occurredAt,
  }));
  return <NewStep helperId={helperId} from={null} correcting={correcting} timeZone={timeZone} />;
}
