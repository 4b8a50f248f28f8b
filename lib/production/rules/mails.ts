/** Invariant: a mail about a reservation says what is at stake in kilograms, until when, and where to act. */
import { formatKg } from "@/lib/core/mass";
import { dayOf, formatDay, type Instant } from "@/lib/core/time";

type About = {
  number: number;
  pieceName: string;
  grams: number;
  shortGrams: number;
  lapsesAt: Instant;
  address: string;
};
type Words = { subject: string; body: string };

export function lapseMail(run: About, zone: string): Words {
  const day = formatDay(dayOf(run.lapsesAt, zone));
  return {
    subject: `Run ${run.number}: ${formatKg(run.grams)} kg are free again on ${day}`,
    body: `What is reserved for run ${run.number}, ${run.pieceName}, lapses on ${day}: ${formatKg(run.grams)} kg.\n\nStart the run, or prolong it here:\n${run.address}\n`,
  };
}

export function shortMail(run: About): Words {
  return {
    subject: `Run ${run.number} is short by ${formatKg(run.shortGrams)} kg`,
    body: `A count, a correction or somebody's need left less in the lots than was promised. Run ${run.number}, ${run.pieceName}, is short by ${formatKg(run.shortGrams)} kg of the ${formatKg(run.grams)} kg reserved.\n\nChange the blend or reserve other lots here:\n${run.address}\n`,
  };
}
