// What the service answers about drift, as /openapi/v1.json describes it.
import type { Stated } from "../types";

export interface DayMean { at: string; value: number; count: number }

export interface ChartState {
  referenceDays: number;
  chartedDays: number;
  target: number;
  standardDeviation: number;
  ewma: number;
  ewmaLimit: number;
  ewmaRunLength: number;
  ewmaRunLengthAtOne: number;
  cusumUpper: number;
  cusumLower: number;
  cusumLimit: number;
  cusumRunLength: number;
  cusumRunLengthAtOne: number;
  signal: "none" | "increase" | "decrease";
  signalsSince: string | null;
}

export interface Forecast {
  criterion: string;
  scope: string;
  band: string | null;
  quantity: string;
  unit: string;
  setPointCelsius: number | null;
  reference: number;
  limit: number | null;
  days: DayMean[];
  slopePerYear: Stated | null;
  isSignificant: boolean;
  medianSlopePerYear: number | null;
  mannKendallProbability: number | null;
  autocorrelation: number | null;
  line: [number, number] | null;
  expected: string | null;
  earliest: string | null;
  latest: string | null;
  chart: ChartState | null;
  assessments: number;
  digest: string;
  explanation: string;
}

export interface ForecastList { source: string; at: string; items: Forecast[] }
