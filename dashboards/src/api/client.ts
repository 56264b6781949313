import type { Alert, Faults, Finding, Readings } from "./types";

/** What the service refused, with everything it found wrong. */
export class Refusal extends Error {
  constructor(readonly status: number, title: string, readonly findings: Finding[]) {
    super(title);
  }

  /** All findings as sentences for a person. */
  get sentences(): string[] {
    return this.findings.length > 0 ? this.findings.map((finding) => `${finding.message} ${finding.cure}`) : [this.message];
  }
}

async function ask<T>(path: string, init?: RequestInit): Promise<T> {
  let answer: Response;
  try {
    answer = await fetch(`/api/v1/${path}`, { ...init, headers: { Accept: "application/json", ...init?.headers } });
  } catch (failure) {
    if (failure instanceof DOMException && failure.name === "AbortError") {
      throw failure;
    }
    throw new Refusal(0, "The service does not answer. Nothing was changed; try again when it is back.", []);
  }
  const body: unknown = answer.headers.get("Content-Type")?.includes("json") ? await answer.json() : null;
  if (!answer.ok) {
    const problem = (body ?? {}) as { title?: string; findings?: Finding[] };
    throw new Refusal(answer.status, problem.title ?? `The service answered with status ${answer.status}.`, problem.findings ?? []);
  }
  return body as T;
}

const post = (body: unknown): RequestInit => ({
  method: "POST",
  headers: { "Content-Type": "application/json" },
  body: JSON.stringify(body),
});

export function readReadings(source: string, channel: string, from: Date, to: Date, signal: AbortSignal): Promise<Readings> {
  const query = new URLSearchParams({ channel, from: from.toISOString(), to: to.toISOString() });
  return ask(`sources/${source}/readings?${query}`, { signal });
}

export const readingsAddress = (source: string, channel: string, from: Date, to: Date): string =>
  `/api/v1/sources/${source}/readings?${new URLSearchParams({ channel, from: from.toISOString(), to: to.toISOString(), format: "csv" })}`;

export const listAlerts = (after: string | null): Promise<{ items: Alert[]; next: string | null }> =>
  ask(`alerts?count=20${after === null ? "" : `&after=${encodeURIComponent(after)}`}`);

export const acknowledge = (id: string, by: string, note: string): Promise<Alert> =>
  ask(`alerts/${id}/acknowledge`, post({ by, note: note === "" ? null : note }));

export const listFaults = (): Promise<Faults> => ask("demo/faults");

export const injectFault = (kind: string, source: string, channel: string | null, size: number | null): Promise<Faults> =>
  ask("demo/faults", post({ kind, source, channel, size }));

export const clearFault = (id: string): Promise<Faults> => ask(`demo/faults/${encodeURIComponent(id)}`, { method: "DELETE" });
