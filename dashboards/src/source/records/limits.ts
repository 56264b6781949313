import { ask, send } from "../../api/client";

/** A limit in the lab file's own form. */
export interface LimitEntry {
  id: string;
  revision: number;
  source: string;
  criterion: string;
  maximum: number;
  unit: string;
  rule: string;
  effectiveFrom: string;
  range?: { minimumCelsius?: number; maximumCelsius?: number };
  band?: string;
}

/** One revision of a limit, with who made it and why; without content where it takes the limit out of force. */
export interface LimitRevision {
  id: string;
  revision: number;
  reference: string;
  inForce: boolean;
  effectiveFrom: string;
  withdrawn: boolean;
  author: string;
  reason: string;
  recordedAt: string;
  content: LimitEntry | null;
}

export async function listLimits(source: string, signal: AbortSignal): Promise<LimitRevision[]> {
  const answer = await ask<{ items: LimitRevision[] }>(`limits?${new URLSearchParams({ source, count: "500" })}`, { signal });
  return answer.items;
}

/** What somebody changes about a limit. */
export interface LimitChange { maximum: number; rule: string; effectiveFrom: string; reason: string }

/** The next revision of a limit: what it said, with the changes. */
export function nextRevision(revisions: LimitRevision[], from: LimitEntry, change: LimitChange): LimitEntry & { reason: string } {
  const last = Math.max(from.revision, ...revisions.filter((revision) => revision.id === from.id).map((revision) => revision.revision));
  return { ...from, ...change, revision: last + 1 };
}

export const reviseLimit = (entry: LimitEntry & { reason: string }): Promise<LimitRevision> => send("limits", entry);
