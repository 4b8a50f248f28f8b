"use client";

import { useEffect, useSyncExternalStore } from "react";
import { EMPTY_VIEW, type QueueView } from "@/lib/offline/queue";
import { outbox, startOutbox } from "./outbox";

const nothing = () => EMPTY_VIEW;
const subscribe = (listener: () => void) => outbox().subscribe(listener);
const view = () => outbox().view();

/** What waits on this device, and keeps it being sent while the page is open. */
export function useOutbox(): QueueView {
  useEffect(startOutbox, []);
  return useSyncExternalStore(subscribe, view, nothing);
}
