"use client";

import { formatClock, instant } from "@/lib/core/time";
import { QueuedPhoto } from "./queued-photo";
import { sendingWords } from "./photo-words";
import { useQueuedPhotos } from "./use-queued-photos";

type Props = {
  zone: string;
  helperId: string | null;
  /** What the form on this page shows itself. */
  exceptSubject: string;
};

/** Photos of what was saved before, on other pages too, that are still on this phone. */
export function WaitingPhotos({ zone, helperId, exceptSubject }: Props) {
  const { mine, progress, others } = useQueuedPhotos(helperId);
  const items = mine.filter(({ subjectId }) => subjectId !== exceptSubject);
  const onTheirWay = items.filter(({ state }) => state === "waiting" || state === "sending").length;
  if (items.length === 0 && others === 0) return null;
  return (
    <section aria-label="Photos on this phone" className="mt-6">
      {items.length > 0 ? (
        <>
          <h2 className="mb-2 text-xl">Photos on this phone</h2>
          {onTheirWay > 0 ? (
            <p className="mb-2 text-sm text-soft">
              {sendingWords(onTheirWay)}; weigh on, nothing has to wait for it.
            </p>
          ) : null}
          <ul className="grid gap-2">
            {items.map((item) => (
              <QueuedPhoto
                key={item.photoId}
                item={item}
                name={`Photo of ${formatClock(instant(item.madeAt), zone)}`}
                percent={progress.get(item.photoId)}
              />
            ))}
          </ul>
        </>
      ) : null}
      {others > 0 ? (
        <p className="mt-2 text-sm text-soft">
          {others === 1
            ? "1 photo waits here until its helper signs in on this phone."
            : `${others} photos wait here until their helpers sign in on this phone.`}
        </p>
      ) : null}
    </section>
  );
}
