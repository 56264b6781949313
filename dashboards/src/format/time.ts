const cache = new Map<string, Intl.DateTimeFormat>();

function formatter(timeZone: string, options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
  const key = timeZone + JSON.stringify(options);
  let made = cache.get(key);
  if (made === undefined) {
    made = new Intl.DateTimeFormat("en-GB", { timeZone, hourCycle: "h23", ...options });
    cache.set(key, made);
  }
  return made;
}

/** Time of day in the site's zone; with the date where it is not today there. */
export function clockTime(instant: string | number, timeZone: string, now: number, seconds = false): string {
  const at = new Date(instant);
  const time: Intl.DateTimeFormatOptions = { hour: "2-digit", minute: "2-digit", ...(seconds ? { second: "2-digit" } : {}) };
  const text = formatter(timeZone, time).format(at);
  const isToday = day(at, timeZone) === day(new Date(now), timeZone);
  return isToday ? text : `${day(at, timeZone)} ${text}`;
}

/** Date in the site's zone, ISO 8601. */
export function day(at: Date, timeZone: string): string {
  const parts = formatter(timeZone, { year: "numeric", month: "2-digit", day: "2-digit" }).formatToParts(at);
  const part = (type: string): string => parts.find((candidate) => candidate.type === type)?.value ?? "";
  return `${part("year")}-${part("month")}-${part("day")}`;
}

/** The zone with its offset now, for example "Europe/Dublin, UTC+1". */
export function zoneName(timeZone: string, now: number): string {
  const parts = formatter(timeZone, { timeZoneName: "shortOffset" }).formatToParts(new Date(now));
  const offset = (parts.find((part) => part.type === "timeZoneName")?.value ?? "UTC").replace("GMT", "UTC");
  return `${timeZone}, ${offset === "UTC" ? "UTC+0" : offset}`;
}

/** How long something lasts, in the largest unit that says enough. */
export function span(milliseconds: number): string {
  const seconds = Math.max(0, Math.floor(milliseconds / 1000));
  if (seconds < 90) {
    return `${seconds} s`;
  }
  const minutes = Math.floor(seconds / 60);
  if (minutes < 90) {
    return `${minutes} min`;
  }
  const hours = Math.floor(minutes / 60);
  if (hours < 48) {
    return `${hours} h ${minutes % 60} min`;
  }
  return `${Math.floor(hours / 24)} days`;
}
