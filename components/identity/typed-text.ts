/** What was typed into a form's field of this name; a form without it has "". */
export function typedText(form: HTMLFormElement, name: string): string {
  const value = new FormData(form).get(name);
  return typeof value === "string" ? value : "";
}
