import { ask, send } from "../api/client";
import type { Correction, NewRun, Run, RunPage } from "./types";

const path = (id: string): string => `runs/${encodeURIComponent(id)}`;

export function listRuns(source: string, after: string | null, signal?: AbortSignal): Promise<RunPage> {
  const query = new URLSearchParams({ source, count: "20", ...(after === null ? {} : { after }) });
  return ask(`runs?${query}`, signal === undefined ? {} : { signal });
}

export const startRun = (run: NewRun): Promise<Run> => send("runs", run);
export const endRun = (id: string, note: string | null): Promise<Run> => send(`${path(id)}/end`, { note });
export const correctRun = (id: string, correction: Correction): Promise<Run> => send(`${path(id)}/correct`, correction);
