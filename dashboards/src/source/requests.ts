import { ask } from "../api/client";
import type { Outcome } from "../api/types";
import type { ForecastList } from "./drift/types";
import type { Attribution, Budget, Power } from "./insight/types";
import type { FullAssessment, Profile, SourceDetail } from "./types";

const path = (id: string): string => encodeURIComponent(id);

export const readDetail = (source: string, signal: AbortSignal): Promise<SourceDetail> => ask(`sources/${path(source)}`, { signal });

export const readProfile = (source: string, signal: AbortSignal): Promise<Profile> => ask(`sources/${path(source)}/profile`, { signal });

export const readForecasts = (source: string, signal: AbortSignal): Promise<ForecastList> => ask(`sources/${path(source)}/forecasts`, { signal });

export const readForecastsOf = (assessment: string, signal: AbortSignal): Promise<ForecastList> => ask(`assessments/${path(assessment)}/forecasts`, { signal });

export const readAttribution = (source: string, signal: AbortSignal): Promise<Attribution> => ask(`sources/${path(source)}/attribution`, { signal });

export const readBudgets = (source: string, signal: AbortSignal): Promise<{ items: Budget[] }> => ask(`budgets?source=${path(source)}`, { signal });

export const readPower = (source: string, signal: AbortSignal): Promise<{ items: Power[] }> => ask(`power?source=${path(source)}`, { signal });

export const readRevisions = (assessment: string, signal: AbortSignal): Promise<FullAssessment[]> => ask(`assessments/${path(assessment)}/revisions`, { signal });

interface Page { items: Outcome[]; next: string | null }

// As many rows as the service gives at once, and as many pages as thirty days of ten-minute windows in several scopes need.
const rows = 2_000;
const mostPages = 24;

/** The outcomes of all assessments of a source by a criterion whose windows end in a stretch of time, oldest first. */
export async function readHistory(source: string, criterion: string, from: Date, to: Date, signal: AbortSignal): Promise<Outcome[]> {
  const made: Outcome[] = [];
  let after: string | null = null;
  for (let page = 0; page < mostPages; page++) {
    const query = new URLSearchParams({ source, criterion, from: from.toISOString(), to: to.toISOString(), count: String(rows) });
    if (after !== null) {
      query.set("after", after);
    }
    const answer: Page = await ask(`assessments/outcomes?${query}`, { signal });
    made.push(...answer.items);
    after = answer.next;
    if (after === null) {
      break;
    }
  }
  return made.reverse();
}
