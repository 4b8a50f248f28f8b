/**
 * Hand scanners that type: a burst of characters and Enter. In a text field they need no help; here they work
 * wherever else the focus is, so that nobody has to tap the field between two bags.
 */

/** Scanners send a character every 1 to 20 ms; the fastest fingers need three times that, over eight of them. */
const MOST_MEAN_MS = 40;
/** A busy device may hold one character up; after this long it is another burst. */
const MOST_GAP_MS = 250;
/** So quick that it cannot be meant for the list or button that has the focus. */
const QUICK_MS = 50;
const LEAST_LENGTH = 8;

type Choice = { element: HTMLSelectElement; value: string };

const TEXT_TYPES =
  /^(text|search|url|tel|email|password|number|date|time|datetime-local|month|week)$/;

function takesText(target: EventTarget | null): boolean {
  if (!(target instanceof HTMLElement)) return false;
  if (target instanceof HTMLInputElement) return TEXT_TYPES.test(target.type);
  return target instanceof HTMLTextAreaElement || target.isContentEditable;
}

/**
 * Calls `onScan` with what a hand scanner typed outside of text fields.
 *
 * @returns ends it
 */
export function listenForWedge(onScan: (text: string) => void): () => void {
  let typed = "";
  let [began, last] = [0, 0];
  let choice: Choice | null = null;

  const pressed = (event: KeyboardEvent): void => {
    const { key, target, timeStamp } = event;
    // A question that is open waits for its answer, not for the next bag.
    const isAsking = document.querySelector("dialog[open]") !== null;
    if (
      isAsking ||
      takesText(target) ||
      event.ctrlKey ||
      event.altKey ||
      event.metaKey ||
      event.isComposing
    ) {
      typed = "";
      return;
    }
    // A capital is a Shift first.
    if (key === "Shift" || key === "CapsLock") return;
    const gap = timeStamp - last;
    last = timeStamp;
    const isBurst =
      typed.length >= LEAST_LENGTH && (timeStamp - began) / typed.length <= MOST_MEAN_MS;
    if (key === "Enter" && gap <= MOST_GAP_MS && isBurst) {
      const text = typed;
      typed = "";
      // Enter would press the button that has the focus, or send the form.
      event.preventDefault();
      event.stopPropagation();
      if (choice) putBack(choice);
      onScan(text);
      return;
    }
    if (key.length !== 1) {
      typed = "";
      return;
    }
    if (gap > MOST_GAP_MS || typed === "") {
      typed = "";
      began = timeStamp;
      // The first character of a burst looks like a person's, and a list jumps to the entry it begins.
      choice =
        target instanceof HTMLSelectElement ? { element: target, value: target.value } : null;
    } else if (gap <= QUICK_MS) event.preventDefault();
    typed += key;
  };

  document.addEventListener("keydown", pressed, true);
  return () => document.removeEventListener("keydown", pressed, true);
}

function putBack({ element, value }: Choice): void {
  if (element.value === value) return;
  element.value = value;
  element.dispatchEvent(new Event("change", { bubbles: true }));
}
