/** Puts the cursor where something is missing; of a group of tiles, on the first. */
export function focusField(name: string): void {
  const field = document.querySelector<HTMLElement>(`#weigh-in [name="${CSS.escape(name)}"]`);
  field?.focus();
  field?.scrollIntoView({ block: "center" });
}
