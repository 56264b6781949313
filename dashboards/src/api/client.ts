import type { Alert, Faults, Finding, Readings } from "./types";

/** What the service refused, with everything it found wrong. */
export class Refusal extends Error {
  constructor(readonly status: number, title: string, readonly findings: Finding[] = [], readonly retryAfterSeconds: number | null = null) {
    super(title);
  }

  /** All findings as sentences for a person. */
  get sentences(): string[] {
    return this.findings.length > 0 ? this.findings.map((finding) => `${finding.message} ${finding.cure}`) : [this.message];
  }
}

/** What went wrong as sentences, whatever it was. */
export const sentencesOf = (failure: unknown, otherwise: string): string[] => (failure instanceof Refusal ? failure.sentences : [otherwise]);

/** A request that needs nobody to be signed in (`isOpen`), or one that waits for a new sign-in where the session has ended. */
export interface Asking extends RequestInit { isOpen?: boolean }

/** What a request needs: a sign-in where the session has ended, the password where it was entered too long ago, or a password of one's own first. */
export type Need = "sign-in" | "password" | "own-password";
let waitFor: (need: Need) => Promise<"again" | "leave"> = () => Promise.resolve("leave");

/** Says who asks the person for what a request needs; it waits, and is then sent again or refused. */
export function whenNeeded(wait: typeof waitFor): void {
  waitFor = wait;
}

/** Asks the service; a request that is refused for want of a sign-in or of the password is sent again after it. */
export async function ask<T>(path: string, { isOpen, ...init }: Asking = {}): Promise<T> {
  for (;;) {
    const answer = await fetched(path, init);
    const hasBody = answer.status !== 204 && answer.headers.get("Content-Type")?.includes("json") === true;
    const body: unknown = hasBody ? await answer.json() : null;
    if (answer.ok) {
      return body as T;
    }
    const problem = (body ?? {}) as { title?: string; findings?: Finding[] };
    const findings = problem.findings ?? [];
    const need = isOpen === true ? null : needOf(answer.status, findings);
    if (need === null || (await waitFor(need)) === "leave") {
      const wait = Number(answer.headers.get("Retry-After") ?? "");
      throw new Refusal(answer.status, problem.title ?? `The service answered with status ${answer.status}.`, findings, wait > 0 ? wait : null);
    }
  }
}

function needOf(status: number, findings: Finding[]): Need | null {
  const has = (code: string): boolean => findings.some((finding) => finding.code === code);
  if (status === 401) {
    return "sign-in";
  }
  return status !== 403 ? null : has("confirm-password") ? "password" : has("password-change-needed") ? "own-password" : null;
}

async function fetched(path: string, init: RequestInit): Promise<Response> {
  try {
    return await fetch(`/api/v1/${path}`, { ...init, headers: { Accept: "application/json", ...init.headers } });
  } catch (failure) {
    if (failure instanceof DOMException && failure.name === "AbortError") {
      throw failure;
    }
    throw new Refusal(0, "The service does not answer. Nothing was changed; try again when it is back.");
  }
}

/** Sends something as JSON. */
export const send = <T>(path: string, body: unknown, asking: Asking = {}): Promise<T> =>
  ask(path, { ...asking, method: "POST", headers: { "Content-Type": "application/json" }, body: JSON.stringify(body) });

/** Takes something away. */
export const remove = <T>(path: string): Promise<T> => ask(path, { method: "DELETE" });

export function readReadings(source: string, channel: string, from: Date, to: Date, signal: AbortSignal): Promise<Readings> {
  const query = new URLSearchParams({ channel, from: from.toISOString(), to: to.toISOString() });
  return ask(`sources/${source}/readings?${query}`, { signal });
}

export const readingsAddress = (source: string, channel: string, from: Date, to: Date): string =>
  `/api/v1/sources/${source}/readings?${new URLSearchParams({ channel, from: from.toISOString(), to: to.toISOString(), format: "csv" })}`;

export const listAlerts = (after: string | null): Promise<{ items: Alert[]; next: string | null }> =>
  ask(`alerts?count=20${after === null ? "" : `&after=${encodeURIComponent(after)}`}`);

export const acknowledge = (id: string, note: string): Promise<Alert> => send(`alerts/${id}/acknowledge`, { note: note === "" ? null : note });

/** Tells nobody of an alert for some minutes, or until it is put back into service where there are none. */
export const shelve = (id: string, reason: string, minutes: number | null): Promise<Alert> =>
  send(`alerts/${id}/${minutes === null ? "out-of-service" : "shelve"}`, { reason, minutes });

/** Ends a shelf, or puts an alert back into service. */
export const unshelve = (alert: Alert): Promise<Alert> =>
  send(`alerts/${alert.id}/${alert.shelf?.until === null ? "return-to-service" : "unshelve"}`, { note: null });

export const listFaults = (): Promise<Faults> => ask("demo/faults");

export const injectFault = (kind: string, source: string, channel: string | null, size: number | null): Promise<Faults> =>
  send("demo/faults", { kind, source, channel, size });

export const clearFault = (id: string): Promise<Faults> => remove(`demo/faults/${encodeURIComponent(id)}`);
