const offsets = new Map<string, Intl.DateTimeFormat>();

/** Date and time of an instant in a zone, to the second: "2026-07-01 12:30:05". */
export function zonedText(instant: string | number, timeZone: string): string {
  const milliseconds = new Date(instant).getTime();
  return new Date(milliseconds + offsetAt(milliseconds, timeZone)).toISOString().slice(0, 19).replace("T", " ");
}

/** What a field for date and time shows for an instant: "2026-07-01T12:30". */
export const fieldText = (instant: string, timeZone: string): string => zonedText(instant, timeZone).replace(" ", "T").slice(0, 16);

/**
 * The instant of a date and time in a zone, as RFC 3339 in UTC; null where the text is none. An hour that comes twice means its first
 * pass, one that clocks leave out the time an hour later.
 */
export function instantOf(field: string, timeZone: string): string | null {
  const asUtc = Date.parse(`${field}Z`);
  if (!/^\d{4}-\d\d-\d\dT\d\d:\d\d(:\d\d)?$/.test(field) || Number.isNaN(asUtc)) {
    return null;
  }
  // The offset a day before and a day after: only where they differ is there a choice.
  const day = 86_400_000;
  const before = asUtc - offsetAt(asUtc - day, timeZone);
  const after = asUtc - offsetAt(asUtc + day, timeZone);
  const fits = (candidate: number): boolean => candidate + offsetAt(candidate, timeZone) === asUtc;
  const chosen = fits(before) ? before : fits(after) ? after : before;
  return new Date(chosen).toISOString().replace(".000Z", "Z");
}

/** How far a zone is ahead of UTC at an instant, milliseconds. */
function offsetAt(milliseconds: number, timeZone: string): number {
  let made = offsets.get(timeZone);
  if (made === undefined) {
    made = new Intl.DateTimeFormat("en-GB", {
      timeZone,
      hourCycle: "h23",
      year: "numeric",
      month: "numeric",
      day: "numeric",
      hour: "numeric",
      minute: "numeric",
      second: "numeric",
    });
    offsets.set(timeZone, made);
  }
  const parts = new Map(made.formatToParts(milliseconds).map(({ type, value }) => [type, Number(value)]));
  const part = (name: string): number => parts.get(name as Intl.DateTimeFormatPartTypes) ?? 0;
  const local = Date.UTC(part("year"), part("month") - 1, part("day"), part("hour"), part("minute"), part("second"));
  return local - Math.floor(milliseconds / 1000) * 1000;
}
