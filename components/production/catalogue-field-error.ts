import { fieldSentence } from "@/lib/core/messages";

/** A field's refusal: the form's own check first, then the server's. */
export function fieldError(issue: { message?: string } | undefined, answered: string | undefined) {
  // The schema library's own words are no code of ours; the field says the rest.
  const code = issue?.message;
  if (code === undefined || code === "") return answered;
  return fieldSentence(/^[a-z][a-z_-]*$/.test(code) ? code : "empty");
}
