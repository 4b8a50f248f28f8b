import { fetchEndpoint, type AddressOf } from "@/components/forms/fetch-endpoint";
import { ProblemError } from "@/components/forms/problem-document";
import type { getAccountEndpoint } from "@/lib/identity/contract";
import { idbPhotoStore } from "@/lib/offline/idb-photo-store";
import { PhotoBox } from "@/lib/offline/photo-box";
import type { PhotoItem, PhotoOutcome } from "@/lib/offline/photo-queue";
import { aloneAmongTabs, sendingOccasions } from "@/lib/offline/triggers";
import { signalPhotos } from "./photo-signal";

const ACCOUNT: AddressOf<typeof getAccountEndpoint> = { method: "GET", path: "/api/account" };
const CHANNEL = "bismar-photos";

const stop = (code: string): PhotoOutcome => ({ kind: "stop", trouble: { code, values: {} } });

/** Whose session it is now: null for nobody's, undefined when no answer came. */
async function whoseSession(): Promise<string | null | undefined> {
  try {
    return (await fetchEndpoint(ACCOUNT, {})).personId;
  } catch (error) {
    return error instanceof ProblemError && error.problem.status < 500 ? null : undefined;
  }
}

async function upload(
  item: PhotoItem,
  watch: Parameters<ConstructorParameters<typeof PhotoBox>[0]["upload"]>[1],
): Promise<PhotoOutcome> {
  // Asked each time: another helper may have signed in on this phone since, in another tab.
  const helper = await whoseSession();
  if (helper === undefined) return stop("unreachable");
  if (helper !== item.helper) return stop("signed-out");
  try {
    const { sendPhoto } = await import("./send-photo");
    return await sendPhoto(item, watch);
  } catch {
    return stop("unreachable");
  }
}

let made: { box: PhotoBox; started: boolean } | null = null;

/** The browser's one queue of photos. Only called in the browser. */
export function photoBox(): PhotoBox {
  if (made) return made.box;
  const others = "BroadcastChannel" in window ? new BroadcastChannel(CHANNEL) : null;
  const box = new PhotoBox({
    store: idbPhotoStore(),
    upload,
    alone: (photoId, work) => aloneAmongTabs(`${CHANNEL}:${photoId}`, work),
    tellOthers: () => others?.postMessage("changed"),
    now: Date.now,
  });
  if (others) others.onmessage = () => void box.refresh();
  box.subscribe(() => {
    const { waiting, toLookAt, others: ofOthers } = box.view();
    signalPhotos({ waiting, toLookAt }, ofOthers);
  });
  made = { box, started: false };
  return box;
}

/**
 * Sends what waits, on every occasion, for as long as the program is open. Whose session it is, is asked when
 * something waits.
 */
export function startPhotoBox(): PhotoBox {
  const box = photoBox();
  if (!made || made.started) return box;
  made.started = true;
  const tick = async (impatient: boolean): Promise<void> => {
    await box.refresh();
    const { mine, others } = box.view();
    if (mine.length + others === 0) return;
    const helper = await whoseSession();
    if (helper === undefined) return;
    await box.setHelper(helper);
    await box.sendAll(impatient);
  };
  sendingOccasions(() => void tick(false));
  // "online" is a hint that what failed a moment ago may now go through.
  window.addEventListener("online", () => void tick(true));
  void tick(true);
  return box;
}
