import { describe, expect, it } from "vitest";
import { instant } from "@/lib/core/time";
import { lapseMail, shortMail } from "@/lib/production/rules/mails";

const about = {
  number: 12,
  pieceName: "Coat hook",
  grams: 1176,
  shortGrams: 76,
  lapsesAt: instant(Date.UTC(2026, 4, 20, 22, 30)),
  address: "https://shed.example/runs/12",
};

describe("mails about a reservation", () => {
  it("say a day before it lapses how much is at stake, until when, and where to act", () => {
    const { subject, body } = lapseMail(about, "UTC");
    expect(subject).toBe("Run 12: 1.176 kg are free again on 20 May 2026");
    for (const words of ["run 12", "Coat hook", "20 May 2026", "1.176 kg", about.address]) {
      expect(body).toContain(words);
    }
  });

  it("name the day of the scheme's own zone", () => {
    expect(lapseMail(about, "Europe/Paris").subject).toContain("21 May 2026");
  });

  it("say how much is missing of how much when it turned short", () => {
    const { subject, body } = shortMail(about);
    expect(subject).toBe("Run 12 is short by 0.076 kg");
    for (const words of ["Run 12", "Coat hook", "0.076 kg", "1.176 kg", about.address]) {
      expect(body).toContain(words);
    }
  });
});
