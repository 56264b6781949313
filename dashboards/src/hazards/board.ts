import type { Alert } from "../api/types";

/** Hazards that stand now: each of them is looked at, and acknowledged, by itself. */
export const standing = (open: Alert[]): Alert[] => open.filter((alert) => alert.isHazard && alert.returnedAt === null);

/** Hazards whose condition has gone and that nobody has acknowledged. */
export const gone = (open: Alert[]): Alert[] => open.filter((alert) => alert.isHazard && alert.returnedAt !== null);

export interface SourceHazards {
  source: string;
  name: string;
  alerts: Alert[];
  /** The one whose detail is open by itself: the first that nobody has acknowledged; null where all are. */
  first: string | null;
}

/** Hazards under their sources, in the order they come in. */
export function bySource(alerts: Alert[]): SourceHazards[] {
  const made = new Map<string, SourceHazards>();
  for (const alert of alerts) {
    const group = made.get(alert.source) ?? { source: alert.source, name: alert.sourceName, alerts: [], first: null };
    group.alerts.push(alert);
    group.first ??= alert.acknowledgedAt === null ? alert.id : null;
    made.set(alert.source, group);
  }
  return [...made.values()];
}

/** The part of a source's name that people say: what stands before the colon. */
export const shortName = (name: string): string => name.split(":", 1)[0]!.trim() || name;

/** A headline under its source's name: without that name, which the service may have cut ("Rowan: block fu..."). */
export function headlineWithin(alert: Alert): string {
  const { headline, sourceName } = alert;
  if (headline.startsWith(`${sourceName}, `)) {
    return headline.slice(sourceName.length + 2);
  }
  const dots = headline.indexOf("..., ");
  return dots > 0 && sourceName.startsWith(headline.slice(0, dots)) ? headline.slice(dots + 5) : headline;
}

/** What happened: the first sentence of a headline, without source and channel. The rest speaks of a time that is over. */
export function eventOf(alert: Alert): string {
  const rest = headlineWithin(alert);
  const colon = rest.indexOf(": ");
  const place = rest.slice(0, colon).replace(/\.\.\.$/, "");
  const text = colon > 0 && alert.subjectName.startsWith(place) ? rest.slice(colon + 2) : rest;
  const sentence = text.split(". ", 1)[0]!.replace(/\.$/, "");
  return sentence.charAt(0).toUpperCase() + sentence.slice(1);
}

export interface Advice { label: string; text: string }

/** The service's words: what is the case, and what to do. Where, since and the caution stand elsewhere on the page. */
export function detailParts(detail: string): { what: string[]; advice: Advice[] } {
  const lines = detail.split("\n").filter((line) => line !== "" && !/^(LabWatch is no protective device|Where: |Since: )/.test(line));
  const label = (line: string): string => /^(Do not|Do): /.exec(line)?.[1] ?? "";
  return {
    what: lines.filter((line) => label(line) === ""),
    advice: lines.filter((line) => label(line) !== "").map((line) => ({ label: label(line), text: line.slice(label(line).length + 2) })),
  };
}

/** The first thing to do, in one line, and the rest of the advice, so that nothing is read twice. */
export function firstStep(advice: Advice[]): { first: string | null; rest: Advice[] } {
  const [todo, ...others] = advice;
  if (todo === undefined || todo.label !== "Do") {
    return { first: null, rest: advice };
  }
  const end = todo.text.indexOf("; ");
  return end < 0
    ? { first: todo.text, rest: others }
    : { first: `${todo.text.slice(0, end)}.`, rest: [{ label: "Do also", text: todo.text.charAt(end + 2).toUpperCase() + todo.text.slice(end + 3) }, ...others] };
}
