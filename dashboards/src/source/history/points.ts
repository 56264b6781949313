import { ticksOver, type Ticks } from "../../chart/ticks";
import type { Outcome } from "../../api/types";

/** An assessment as a point: the end of its window in seconds, its value and reach, and its limit. */
export interface HistoryPoint { at: number; value: number | null; reach: number; limit: number | null; assessment: Outcome }

/** Whether a point has a value that something was decided on: the others (an approach, too few readings) are marked, not drawn as values. */
export const isDecided = (point: HistoryPoint): point is HistoryPoint & { value: number } => point.value !== null && (point.assessment.decision !== "not-decided" || point.limit === null);

/** Points of one scope, oldest first. */
export function pointsOf(assessments: Outcome[], scope: string): HistoryPoint[] {
  return assessments
    .filter((assessment) => assessment.scope === scope)
    .map((assessment) => ({
      at: Date.parse(assessment.windowEnd) / 1000,
      value: assessment.value,
      reach: assessment.expandedUncertainty ?? 0,
      limit: assessment.limit,
      assessment,
    }))
    .sort((one, other) => one.at - other.at);
}

/** Scopes that assessments have, in order. */
export const scopesOf = (assessments: Outcome[]): string[] => [...new Set(assessments.map((assessment) => assessment.scope))].sort();

/** The value scale of a history: every value with its reach and every limit, but for values so far out that they would flatten the rest. */
export interface ValueScale { ticks: Ticks; cut: number }

// Values beyond this many times the limit are drawn at the edge: one outlier must not hide what happened near the limit.
const farthest = 2.5;

export function valueScale(points: HistoryPoint[]): ValueScale {
  const known = points.filter(isDecided);
  const limits = points.map((point) => point.limit).filter((limit): limit is number => limit !== null);
  const most = limits.length === 0 ? Infinity : farthest * Math.max(...limits.map(Math.abs));
  const ends = known.flatMap((point) => [point.value - point.reach, point.value + point.reach]).filter((value) => Math.abs(value) <= most);
  // Values of which none is below zero start at zero, so that a length in the chart is a size.
  const isSize = known.every((point) => point.value >= 0) && limits.every((limit) => limit >= 0);
  const low = Math.min(isSize ? 0 : Infinity, ...ends, ...limits);
  const high = Math.max(isSize ? 0 : -Infinity, ...ends, ...limits);
  const ticks = Number.isFinite(low) && Number.isFinite(high) ? ticksOver(isSize ? 0 : low, high, 4) : ticksOver(0, 1, 4);
  return { ticks, cut: known.filter((point) => point.value < ticks.low || point.value > ticks.high).length };
}

/** Stretches of points that follow each other without a hole; a hole is longer than three times the usual distance. */
export function stretches(points: HistoryPoint[]): HistoryPoint[][] {
  const known = points.filter(isDecided);
  const distances = points.slice(1).map((point, i) => point.at - points[i]!.at).sort((one, other) => one - other);
  const usual = distances[Math.floor(distances.length / 2)] ?? 0;
  const made: HistoryPoint[][] = [];
  for (const point of known) {
    const last = made[made.length - 1];
    if (last === undefined || (usual > 0 && point.at - last[last.length - 1]!.at > 3 * usual)) {
      made.push([point]);
    } else {
      last.push(point);
    }
  }
  return made;
}

/** The limit as it was: pieces of one value. */
export function limitPieces(points: HistoryPoint[], to: number): { from: number; to: number; limit: number }[] {
  const made: { from: number; to: number; limit: number }[] = [];
  for (const point of points) {
    if (point.limit === null) {
      continue;
    }
    const last = made[made.length - 1];
    if (last === undefined || last.limit !== point.limit) {
      if (last !== undefined) {
        last.to = point.at;
      }
      made.push({ from: point.at, to: point.at, limit: point.limit });
    } else {
      last.to = point.at;
    }
  }
  const last = made[made.length - 1];
  if (last !== undefined) {
    last.to = to;
  }
  return made;
}

/** The point nearest to a time; -1 where there is none. */
export function nearest(points: HistoryPoint[], at: number): number {
  let best = -1;
  points.forEach((point, i) => {
    if (best < 0 || Math.abs(point.at - at) < Math.abs(points[best]!.at - at)) {
      best = i;
    }
  });
  return best;
}

/** Which points get a mark of their own: all where there is room, else those that are not plain passes, and every so many of the rest. */
export function marked(points: HistoryPoint[], room: number): Set<number> {
  const every = Math.max(1, Math.ceil(points.length / Math.max(1, room)));
  return new Set(points.flatMap((point, i) => (i % every === 0 || !["pass", "not-decided"].includes(point.assessment.decision) || point.assessment.revision > 1 ? [i] : [])));
}
