import { Notice } from "@/components/ui/notice";
import type { LaterUses as Later } from "@/lib/core/schemas";
import { LaterUsesList } from "./later-uses-list";

type Props = { later: Later; title: string; timeZone: string };

/** A correction that went through, with what was taken since from what the corrected record had filled. */
export function LaterUses({ later, title, timeZone }: Props) {
  return (
    <Notice tone={later.count > 0 ? "warn" : "ok"} title={title} live="status">
      {later.count === 0 ? (
        "Nothing had been taken from it since."
      ) : (
        <>
          <p>Taken from it since, and left as it is:</p>
          <LaterUsesList later={later} timeZone={timeZone} />
        </>
      )}
    </Notice>
  );
}
