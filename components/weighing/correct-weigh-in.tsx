"use client";

import { useState } from "react";
import { Notice } from "@/components/ui/notice";
import { Skeleton } from "@/components/ui/skeleton";
import type { CorrectWeighInReceipt, WeighInPage } from "@/lib/weighing/contract/corrections";
import { LaterUsesList } from "../ledger/later-uses-list";
import { CorrectForm } from "./correct-form";
import { CorrectedWeighIn } from "./corrected-weigh-in";
import { useDeskLists } from "./use-desk-lists";

type Props = { weighIn: WeighInPage; timeZone: string };

/** Says what should have been weighed in, or that nothing was; later uses are named before and after. */
export function CorrectWeighIn({ weighIn, timeZone }: Props) {
  const lists = useDeskLists();
  const [done, setDone] = useState<CorrectWeighInReceipt | null>(null);
  if (done) return <CorrectedWeighIn receipt={done} timeZone={timeZone} />;
  if (!lists.ready) return <Skeleton shape="tickets" count={3} label="Loading the weigh-in" />;
  return (
    <div className="flex grow flex-col rail:max-w-xl">
      {weighIn.later.count > 0 ? (
        <Notice tone="warn" title="Used since" className="mb-4">
          The correction goes through all the same. These stay as they are; what the bag or its lot
          no longer holds is written down as difference.
          <LaterUsesList later={weighIn.later} timeZone={timeZone} />
        </Notice>
      ) : null}
      <CorrectForm
        weighIn={weighIn}
        lists={lists}
        timeZone={timeZone}
        onDone={(receipt) => {
          setDone(receipt);
          window.scrollTo({ top: 0 });
        }}
      />
    </div>
  );
}
