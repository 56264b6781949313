import { words } from "../format/words";
import { sourceAddress } from "../shell/routes";
import type { TrailEntry } from "../api/trail";

const actionWords: Record<string, string> = {
  "alert-opened": "Alert raised",
  "alert-step": "Alert changed its state",
  "assessment-recorded": "Assessment recorded",
  "configuration-in-force": "Configuration in force",
  "hour-sealed": "Hour of readings sealed",
  "lab-file-imported": "Lab file imported",
  "record-revised": "Record revised",
  "run-corrected": "Run corrected",
  "run-ended": "Run ended",
  "run-started": "Run started",
  "service-started": "Service started",
  "set-up-done": "Set-up done",
  "signed-in": "Signed in",
  "sign-in-refused": "Sign-in refused",
  "signed-out": "Signed out",
  "account-created": "Account made",
  "account-changed": "Account changed",
  "password-changed": "Password changed",
  "token-created": "Token made",
  "token-revoked": "Token revoked",
  "head-differs": "End of the trail does not fit its note",
  "chain-begun": "Table taken into the trail",
  "chained-later": "Older record taken into the trail",
};

/** Every action that a filter offers. */
export const actions = Object.keys(actionWords);

export const actionWord = (action: string): string => actionWords[action] ?? words(action);

/** What happened, in an entry: an alert's step says which one it was. */
export function happening({ action, content }: Pick<TrailEntry, "action" | "content">): string {
  const event = content["event"];
  return action === "alert-step" && typeof event === "string" ? `Alert ${event.replaceAll("-", " ")}` : actionWord(action);
}

/** Who did it: an account, or the service itself. */
export const actorWord = (actor: string): string => (actor === "labwatch" ? "LabWatch itself" : actor);

/** What an entry is about: in words, the page of its source where there is one, and the record as the API gives it. */
export interface Subject { text: string; page: string | null; record: string | null; whole: string }

/** A subject in words: "record/limit/rowan-stability@3" gives "Limit rowan-stability, revision 3". */
export function subjectOf(entry: Pick<TrailEntry, "site" | "subject" | "content">, sources: readonly string[]): Subject {
  const [kind = "", ...rest] = entry.subject.replace(/^record\//, "").split("/");
  const named = [...rest, entry.content["source"]].flatMap((part) => (typeof part === "string" ? [part, `${entry.site}.${part}`] : []));
  const source = named.find((part) => sources.includes(part));
  const page = source === undefined ? null : sourceAddress(source);
  const list = { alert: "alerts", assessment: "assessments" }[kind];
  const record = list === undefined || rest[0] === undefined ? null : `/api/v1/${list}/${encodeURIComponent(rest[0])}`;
  // Every step of an alert or a run, where the entry is about one of them.
  const whole = rest.length > 1 && (kind === "alert" || kind === "run") ? `${kind}/${rest[0]}/` : entry.subject;
  return { text: textOf(kind, rest), page, record, whole };
}

function textOf(kind: string, rest: string[]): string {
  const [id = "", second] = rest;
  switch (kind) {
    case "alert":
    case "run":
      return `${words(kind)} ${shortId(id)}${second === undefined ? "" : `, step ${second}`}`;
    case "hour":
      return `Hour ${rest.slice(1).join(", part ")} of ${id}`;
    default: {
      const [name = "", revision] = rest.join("/").split("@");
      return `${words(kind)} ${shortId(name)}${revision === undefined ? "" : `, revision ${revision}`}`.trim();
    }
  }
}

/** The end of a long id tells it apart; the whole stands where the entry is open. */
const shortId = (id: string): string => (/^[0-9a-f-]{32,}$/.test(id) ? `…${id.slice(-8)}` : id);
