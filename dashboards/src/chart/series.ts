import type { Readings } from "../api/types";

/** Columns as the chart draws them: seconds, and values with holes where readings are missing. */
export interface Columns {
  time: number[];
  value: (number | null)[];
  low: (number | null)[];
  high: (number | null)[];
  /** Set point as it was; null where there is none, or where it was changed inside the row. Missing where none is asked for. */
  setPoint?: (number | null)[];
  /** Spans without readings, seconds. */
  gaps: [number, number][];
  isTemperature: boolean;
  /** Whether each row is a bucket with lowest and highest value. */
  isReduced: boolean;
}

// A channel counts as interrupted when more than this many of its steps are missing.
const stepsMissing = 3;

/** Makes the columns of an answer; `intervalSeconds` is what the device promises. */
export function columnsOf(readings: Readings, intervalSeconds: number): Columns {
  const isTemperature = readings.celsius !== null;
  const value = readings.celsius ?? readings.raw;
  const low = isTemperature ? readings.celsiusMinimum : readings.rawMinimum;
  const high = isTemperature ? readings.celsiusMaximum : readings.rawMaximum;
  const step = typicalStep(readings, intervalSeconds);
  const columns: Columns = { time: [], value: [], low: [], high: [], gaps: [], isTemperature, isReduced: readings.bucketSeconds !== null };
  const from = Date.parse(readings.from) / 1000;
  const to = Date.parse(readings.to) / 1000;
  let before: number | null = null;
  readings.time.forEach((text, i) => {
    const at = Date.parse(text) / 1000;
    if (at - (before ?? from) > stepsMissing * step) {
      columns.gaps.push([before ?? from, at]);
      if (before !== null) {
        push(columns, before + step / 2, null, null, null);
      }
    }
    push(columns, at, value[i] ?? null, low?.[i] ?? value[i] ?? null, high?.[i] ?? value[i] ?? null);
    before = at;
  });
  if (to - (before ?? from) > stepsMissing * step) {
    columns.gaps.push([before ?? from, to]);
  }
  return columns;
}

/**
 * The same columns with the set point that was in force at each row: the newest before it. A bucket in which it was changed keeps the
 * one from before, since a mean of two set points was never asked for.
 */
export function withSetPoint(columns: Columns, readings: Readings): Columns {
  const known: { at: number; value: number }[] = [];
  readings.time.forEach((text, i) => {
    const value = readings.raw[i] ?? null;
    const isChanged = readings.rawMinimum !== null && readings.rawMinimum[i] !== readings.rawMaximum?.[i];
    if (value !== null && !isChanged) {
      known.push({ at: Date.parse(text) / 1000, value });
    }
  });
  let next = 0;
  const setPoint = columns.time.map((at, row) => {
    while (next < known.length && known[next]!.at <= at) {
      next++;
    }
    return columns.value[row] === null ? null : (known[next - 1]?.value ?? known[0]?.value ?? null);
  });
  return { ...columns, setPoint };
}

function push(columns: Columns, time: number, value: number | null, low: number | null, high: number | null): void {
  columns.time.push(time);
  columns.value.push(value);
  columns.low.push(low);
  columns.high.push(high);
}

/** The step that rows keep: the bucket, but not less than the device's interval or the median distance found (older data may be sparser). */
function typicalStep(readings: Readings, intervalSeconds: number): number {
  const distances = readings.time.slice(1).map((text, i) => (Date.parse(text) - Date.parse(readings.time[i]!)) / 1000);
  distances.sort((one, other) => one - other);
  const sparse = distances[Math.floor(distances.length * 0.9)] ?? 0;
  return Math.max(readings.bucketSeconds ?? 0, intervalSeconds, Math.min(sparse, 60));
}
