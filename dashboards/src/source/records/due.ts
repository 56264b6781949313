const day = 86_400_000;

/** How a due date stands: by word and urgency. */
export interface Due { state: "overdue" | "soon" | "fine" | "none"; text: string }

// From this many days before it is due a recalibration is to be arranged.
const soonDays = 30;

/** Days until a certificate's recalibration is due, as people count them: on the day itself it is due today. */
export function dueOf(dueAt: string | null, now: number): Due {
  if (dueAt === null) {
    return { state: "none", text: "no interval set" };
  }
  const left = Date.parse(dueAt) - now;
  const days = Math.floor(Math.abs(left) / day);
  if (left < 0) {
    return { state: "overdue", text: days === 0 ? "overdue since today" : `overdue by ${days} ${days === 1 ? "day" : "days"}` };
  }
  return { state: left < soonDays * day ? "soon" : "fine", text: days === 0 ? "due within a day" : `${days} ${days === 1 ? "day" : "days"} left` };
}
