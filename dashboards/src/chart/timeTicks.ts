const minute = 60;
const hour = 3_600;
const day = 86_400;
const steps = [minute, 2 * minute, 5 * minute, 10 * minute, 15 * minute, 30 * minute, hour, 2 * hour, 3 * hour, 6 * hour, 12 * hour, day, 2 * day, 3 * day, 5 * day, 7 * day, 10 * day, 14 * day];

export interface TimeTick { at: number; text: string }

/** Ticks of a time axis in the site's zone, on full minutes, hours and days there; summer time's change moves none off its hour. Seconds. */
export function timeTicks(from: number, to: number, zone: string, about: number): TimeTick[] {
  const step = steps.find((candidate) => (to - from) / candidate <= Math.max(1, about)) ?? 30 * day;
  const made: TimeTick[] = [];
  const local = (at: number): number => at + offsetOf(at, zone);
  let wall = Math.ceil(local(from) / step) * step;
  for (; made.length < 200; wall += step) {
    const at = instantOf(wall, zone);
    if (at > to) {
      break;
    }
    if (at >= from && (made.length === 0 || at > made[made.length - 1]!.at)) {
      made.push({ at, text: text(at, step, zone) });
    }
  }
  return made;
}

/** Seconds by which a zone's clocks are ahead of UTC at an instant. */
export function offsetOf(at: number, zone: string): number {
  const parts = formatter(zone, { year: "numeric", month: "2-digit", day: "2-digit", hour: "2-digit", minute: "2-digit", second: "2-digit" }).formatToParts(new Date(at * 1000));
  const part = (type: string): number => Number(parts.find((candidate) => candidate.type === type)?.value ?? 0);
  const shown = Date.UTC(part("year"), part("month") - 1, part("day"), part("hour"), part("minute"), part("second")) / 1000;
  return shown - Math.floor(at);
}

function instantOf(wall: number, zone: string): number {
  const guess = wall - offsetOf(wall, zone);
  return wall - offsetOf(guess, zone);
}

function text(at: number, step: number, zone: string): string {
  const isDay = step >= day || (at + offsetOf(at, zone)) % day === 0;
  return formatter(zone, isDay ? { day: "numeric", month: "short" } : { hour: "2-digit", minute: "2-digit" }).format(new Date(at * 1000));
}

const cache = new Map<string, Intl.DateTimeFormat>();

function formatter(zone: string, options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
  const key = zone + JSON.stringify(options);
  const made = cache.get(key) ?? new Intl.DateTimeFormat("en-GB", { timeZone: zone, hourCycle: "h23", ...options });
  cache.set(key, made);
  return made;
}
