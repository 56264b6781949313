import { fieldText, instantOf } from "../format/zoned";

/** What of the trail is shown. Times are RFC 3339; `at` starts the list at one entry. */
export interface TrailFilter { action: string; actor: string; subject: string; from: string; to: string; at: string }

const names = ["action", "actor", "subject", "from", "to", "at"] as const;

/** The filter that an address carries. */
export const filterOf = (query: URLSearchParams): TrailFilter =>
  Object.fromEntries(names.map((name) => [name, query.get(name)?.trim() ?? ""])) as unknown as TrailFilter;

/** The address of what a filter shows: a link that can be handed on. */
export function addressOf(filter: Partial<TrailFilter>): string {
  const query = new URLSearchParams(names.flatMap((name) => (filter[name] === undefined || filter[name] === "" ? [] : [[name, filter[name]]])));
  return query.size === 0 ? "/trail" : `/trail?${query}`;
}

/** What is asked of the service for a page of entries. */
export function askedOf(filter: TrailFilter, after: string | number | null, count: number): URLSearchParams {
  const query = new URLSearchParams();
  for (const name of ["action", "actor", "subject", "from", "to"] as const) {
    if (filter[name] !== "") {
      query.set(name, filter[name]);
    }
  }
  const start = /^\d{1,15}$/.test(filter.at) ? String(Number(filter.at) + 1) : null;
  const from = after ?? start;
  if (from !== null) {
    query.set("after", String(from));
  }
  query.set("count", String(count));
  return query;
}

/** The filter that a form describes; its times are of the site's zone. */
export function filterFrom(fields: FormData, timeZone: string): TrailFilter {
  const text = (name: string): string => String(fields.get(name) ?? "").trim();
  const time = (name: string): string => instantOf(text(name), timeZone) ?? "";
  return { action: text("action"), actor: text("actor"), subject: text("subject"), from: time("from"), to: time("to"), at: "" };
}

/** A time of a filter as its field shows it. */
export const timeField = (instant: string, timeZone: string): string => (instant === "" || Number.isNaN(Date.parse(instant)) ? "" : fieldText(instant, timeZone));

export const isFiltered = (filter: TrailFilter): boolean => names.some((name) => filter[name] !== "");
