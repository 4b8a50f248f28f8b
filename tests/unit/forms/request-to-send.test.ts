import { describe, expect, it } from "vitest";
import { UNREACHABLE_SENTENCE } from "@/components/forms/problem-document";
import { UNANSWERED_SENTENCE } from "@/components/forms/unanswered";
import { requestToSend } from "@/components/forms/request-to-send";

const PATH = "/api/lots/118/merge";
const typed = { toNumber: 120, amount: { how: "all" }, occurredAt: 1000 };
const options = { pressedAt: "occurredAt" };
const first = () => requestToSend(PATH, typed, options, null);

describe("the request for what a form holds", () => {
  it("has an id of its own, in the body too", () => {
    const sent = first();
    expect(JSON.parse(sent.rawBody)).toEqual({ ...typed, requestId: sent.requestId });
    expect(first().requestId).not.toBe(sent.requestId);
  });

  it("is the same to the byte while no answer came, however much later it is pressed again", () => {
    const sent = first();
    const again = requestToSend(PATH, { ...typed, occurredAt: 61_000 }, options, sent);
    expect(again.rawBody).toBe(sent.rawBody);
  });

  it("keeps its id when something was changed, so that the server can tell that the first arrived", () => {
    const sent = first();
    const changed = requestToSend(PATH, { ...typed, toNumber: 121 }, options, sent);
    expect(changed.requestId).toBe(sent.requestId);
    expect(JSON.parse(changed.rawBody)).toMatchObject({ toNumber: 121 });
    // A time that a person typed is a change like any other.
    const later = requestToSend(PATH, { ...typed, occurredAt: 2000 }, {}, sent);
    expect(later.requestId).toBe(sent.requestId);
    expect(JSON.parse(later.rawBody)).toMatchObject({ occurredAt: 2000 });
  });

  it("is another one at another address, and after an answer", () => {
    const sent = first();
    expect(requestToSend("/api/lots/119/merge", typed, options, sent).requestId).not.toBe(
      sent.requestId,
    );
    expect(requestToSend(PATH, typed, options, null).requestId).not.toBe(sent.requestId);
  });

  it("takes the record's own id where the page made it", () => {
    const own = requestToSend(PATH, typed, { requestId: "own" }, null);
    expect(own.requestId).toBe("own");
    expect(requestToSend(PATH, typed, { requestId: "other" }, own).requestId).toBe("other");
  });
});

describe("what is said when no answer came", () => {
  it("claims of no write that it was not saved", () => {
    expect(UNANSWERED_SENTENCE).toMatch(/not known whether/);
    expect(UNANSWERED_SENTENCE).toMatch(/never counted twice/);
    for (const said of [UNANSWERED_SENTENCE, UNREACHABLE_SENTENCE]) {
      expect(said).not.toMatch(/nothing was saved/i);
      expect(said).toMatch(/still here/);
    }
  });
});
