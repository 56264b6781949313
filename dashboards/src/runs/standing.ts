import type { Readiness, Source } from "../api/types";
import type { Run } from "./types";

/** A source's readiness as it may be taken now: unknown where the source is not heard. */
export const presentReadiness = (source: Source, isCurrent: boolean): Readiness =>
  isCurrent
    ? source.status.readiness
    : {
        state: "unknown",
        reasons: [
          {
            code: "no-data",
            text: source.status.newestReadingAt === null ? "There is no reading of this source yet." : "The readings are old: nothing can be said about the present.",
            blocks: true,
            passesByWaiting: false,
          },
        ],
        expected: null,
      };

export type RunState = "open" | "ended" | "cancelled";

export const runState = (run: Run): RunState => (run.cancelled ? "cancelled" : run.endedAt === null ? "open" : "ended");
