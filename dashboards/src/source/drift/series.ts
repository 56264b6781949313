import type { Source } from "../../api/types";
import { ticksOver, type Ticks } from "../../chart/ticks";
import { criterionName, scopeName } from "../criteria";
import type { Forecast } from "./types";

const quantityName: Record<string, string> = {
  "emissivity-departure": "Effective emissivity less baseline",
  "radiance-temperature-offset": "Offset of the radiance temperature",
  "comparator-departure": "Effective emissivity less baseline",
  "comparator-minus-model": "Comparator less model",
  "reference-minus-wells": "Reference less other wells",
};

/** What is followed, without its set point. */
export function seriesName(forecast: Pick<Forecast, "criterion" | "scope" | "quantity">, source: Source): string {
  const scope = scopeName(forecast.scope, source);
  return `${quantityName[forecast.quantity] ?? criterionName(forecast.criterion)}${scope === "" ? "" : `, ${scope}`}`;
}

export const seriesKey = (forecast: Forecast): string => `${forecast.criterion}/${forecast.scope}/${forecast.quantity}`;

/** Whether it asks for a look: a trend beyond chance that reaches its limit, a chart that signals, or a value beyond its limit. */
export function isNotable(forecast: Forecast): boolean {
  const newest = forecast.days[forecast.days.length - 1];
  const isBeyond = newest !== undefined && forecast.limit !== null && Math.abs(newest.value - forecast.reference) > forecast.limit;
  return isBeyond || (forecast.isSignificant && forecast.expected !== null) || (forecast.chart !== null && forecast.chart.signal !== "none");
}

/** The levels at which a limit lies: one above, and one below where the quantity has a sign. */
export function limitsOf(forecast: Forecast): number[] {
  if (forecast.limit === null) {
    return [];
  }
  return forecast.quantity === "value" ? [forecast.reference + forecast.limit] : [forecast.reference - forecast.limit, forecast.reference + forecast.limit];
}

/** An axis that holds the days and the line, and the limits where they do not flatten the days. */
export function scaleOf(forecast: Forecast): Ticks {
  const values = [...forecast.days.map((day) => day.value), ...(forecast.line ?? [])];
  const low = Math.min(...values);
  const high = Math.max(...values);
  const reach = Math.max(high - low, Math.abs(forecast.limit ?? 0) * 0.05, 1e-9);
  const near = limitsOf(forecast).filter((value) => value > low - 4 * reach && value < high + 4 * reach);
  return ticksOver(Math.min(low, ...near) - reach * 0.05, Math.max(high, ...near) + reach * 0.05, 5);
}
