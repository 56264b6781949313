import { ask } from "./client";

export type Json = null | boolean | number | string | Json[] | { [key: string]: Json };

/** One entry of the trail; `digest` covers all of it and `previous`, the digest of the entry before. */
export interface TrailEntry {
  site: string;
  sequence: number;
  at: string;
  actor: string;
  action: string;
  subject: string;
  content: { [key: string]: Json };
  recordDigest: string | null;
  previous: string;
  digest: string;
}

export interface TrailHead { sequence: number; digest: string }
export interface TrailPart { items: TrailEntry[]; next: string | number | null; head: TrailHead | null }

export const listTrail = (query: URLSearchParams, signal: AbortSignal): Promise<TrailPart> => ask(`audit?${query}`, { signal });
