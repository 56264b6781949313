import type { ReadyForecast } from "../../api/types";
import { clockTime } from "../../format/time";

/** When the source can be there, in one sentence; null where nothing can be told. Times that are over are left out. */
export function forecastText(expected: ReadyForecast | null, zone: string, now: number): string | null {
  if (expected === null) {
    return null;
  }
  const time = (instant: string): string => clockTime(instant, zone, now);
  const ahead = (instant: string | null): instant is string => instant !== null && Date.parse(instant) > now;
  const { arrivesEarliest: first, arrivesLatest: last, readyNotBefore: ready } = expected;
  const arrival = !ahead(last) ? null : ahead(first) && time(first) !== time(last) ? `At its set point between ${time(first)} and ${time(last)}` : `At its set point by ${time(last)}`;
  const readiness = ahead(ready) ? `${arrival === null ? "Ready" : "ready"} at ${time(ready)} at the earliest` : null;
  const parts = [arrival, readiness].filter((part) => part !== null);
  return parts.length === 0 ? null : `${parts.join("; ")}.`;
}
