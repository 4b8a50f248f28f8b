/**
 * What a page says when no answer came to a write, which may have arrived all the same. It stands apart from the
 * other sentence: the weigh-in page, whose tickets wait in the queue, does not carry it.
 */
export const UNANSWERED_SENTENCE =
  "The server did not answer, so it is not known whether this was saved. What you typed is still here; press again: it is never counted twice.";
