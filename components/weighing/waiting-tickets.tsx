"use client";

import { useState } from "react";
import { outbox } from "@/components/forms/outbox";
import { useOutbox } from "@/components/forms/use-outbox";
import { Button } from "@/components/ui/button";
import { formatClock, type Instant } from "@/lib/core/time";
import type { QueueItem } from "@/lib/offline/queue";
import { WEIGH_IN_ADDRESS } from "@/lib/weighing/terms";
import { questionWords } from "./question-words";
import type { WeighInEndpointInput } from "./weigh-in-body";
import type { Asking } from "./use-weigh-in";

type Props = {
  zone: string;
  /** Takes a ticket back into the form; null while the form holds something else. */
  onEdit: ((input: WeighInEndpointInput) => void) | null;
};

/** What this phone still holds: waiting to be sent, or sent back for a person to look at. */
export function WaitingTickets({ zone, onEdit }: Props) {
  const { mine, others } = useOutbox();
  const [sending, setSending] = useState(false);
  if (mine.length === 0 && others === 0) return <div id="waiting" />;
  const sendNow = async () => {
    setSending(true);
    await outbox().sendAll();
    setSending(false);
  };
  return (
    <section id="waiting" aria-label="Waiting to send" className="mt-8 scroll-mt-4">
      <div className="mb-2 flex flex-wrap items-center justify-between gap-3">
        <h2 className="text-xl">On this phone</h2>
        {mine.some(({ state }) => state !== "refused") ? (
          <Button variant="quiet" size="small" busy={sending} onClick={() => void sendNow()}>
            Send now
          </Button>
        ) : null}
      </div>
      <ul className="grid gap-2">
        {mine.map((item) => (
          <li key={item.requestId} className="rounded-ticket border border-rule bg-card px-4 py-3">
            <WaitingItem item={item} zone={zone} onEdit={onEdit} />
          </li>
        ))}
      </ul>
      {others > 0 ? (
        <p className="mt-2 text-sm text-soft">
          {others === 1
            ? "1 ticket waits here until its helper signs in on this phone."
            : `${others} tickets wait here until their helpers sign in on this phone.`}
        </p>
      ) : null}
    </section>
  );
}

const STATE_WORDS = {
  queued: "Waiting to be sent",
  sending: "Being sent",
  refused: "Sent back",
} as const;

function WaitingItem({ item, zone, onEdit }: { item: QueueItem } & Props) {
  const isTicket = item.path === WEIGH_IN_ADDRESS.path;
  const asked = item.refusal?.code === "ask" ? (item.refusal.answer as Asking) : null;
  const input = (): WeighInEndpointInput => JSON.parse(item.rawBody) as WeighInEndpointInput;

  const edit = async () => {
    onEdit?.(input());
    await outbox().drop(item.requestId);
  };
  /** The same ticket with the question answered, under the same id: a question keeps nothing. */
  const confirm = async () => {
    const confirmed = asked?.questions.map(({ question }) => question) ?? [];
    const rawBody = JSON.stringify({ ...input(), confirmed });
    const { requestId, method, path, helper, madeAt, label } = item;
    await outbox().drop(requestId);
    await outbox().add({ requestId, method, path, helper, madeAt, label, rawBody });
  };

  return (
    <>
      <div className="flex items-baseline justify-between gap-3">
        <span className="font-mono font-bold tracking-tighter">{item.label}</span>
        <span className="text-sm text-soft">{formatClock(item.madeAt as Instant, zone)}</span>
      </div>
      <p className={`text-sm ${item.state === "refused" ? "font-bold text-bad" : "text-soft"}`}>
        {STATE_WORDS[item.state]}
        {item.tries > 1 && item.state !== "refused" ? `, tried ${item.tries} times` : ""}
      </p>
      {asked
        ? asked.questions.map((question) => (
            <p key={question.question} className="mt-1">
              {questionWords(question, zone)}
            </p>
          ))
        : item.refusal && <p className="mt-1">{item.refusal.sentence}</p>}
      {item.state === "refused" ? (
        <div className="mt-2 flex flex-wrap gap-2">
          {asked ? (
            <Button variant="quiet" size="small" onClick={() => void confirm()}>
              Yes, that is right
            </Button>
          ) : null}
          {isTicket ? (
            <Button
              variant="quiet"
              size="small"
              disabled={onEdit === null}
              onClick={() => void edit()}
            >
              Change it
            </Button>
          ) : null}
          <Button variant="danger" size="small" onClick={() => void outbox().drop(item.requestId)}>
            Delete
          </Button>
          {onEdit === null ? (
            <p className="text-sm text-soft">To change it, first save or clear the bag above.</p>
          ) : null}
        </div>
      ) : null}
    </>
  );
}
