// What the service answers about causes, budgets and power, as /openapi/v1.json describes it.
import type { Stated } from "../types";

export interface Cause { kind: string; subject: string; band: string | null; text: string; probability: number }

export interface Finding {
  basis: "change" | "model";
  sources: string[];
  verdict: "nothing-to-explain" | "explained" | "cannot-be-told-apart" | "unexplained" | "no-data";
  suspects: Cause[];
  candidates: Cause[];
  explanation: string;
  wouldSeparate: string[];
  deviations: { source: string; comparator: string; band: string; channel: string | null; setPointCelsius: number | null; kelvin: number; standardUncertainty: number; recentDays: number; referenceDays: number }[];
}

export interface CoatingInference { band: string; channel: string; stated: Stated; reflectedPart: Stated; lowestPossible: number; lower: number | null; upper: number | null; hasInformation: boolean; explanation: string }

export interface Attribution { source: string; findings: Finding[]; coatings: CoatingInference[] }

export interface BudgetLine { name: string; standardUncertaintyMillikelvin: number; isMeasured: boolean; claimedMillikelvin: number | null; degreesOfFreedom: number | null; share: number }

export interface Budget {
  band: string;
  setPointCelsius: number | null;
  assessment: string;
  windowEnd: string;
  coverageFactor: number;
  degreesOfFreedom: number | null;
  expandedMillikelvin: number;
  cmcMillikelvin: number | null;
  reportableMillikelvin: number;
  cmcHolds: boolean | null;
  lines: BudgetLine[];
  monteCarlo: { lowCelsius: number; highCelsius: number; standardUncertaintyMillikelvin: number; trials: number; agrees: boolean } | null;
  explanation: string;
}

export interface Power {
  criterion: string;
  scope: string;
  quantity: string;
  unit: string;
  setPointCelsius: number | null;
  days: number;
  noise: number | null;
  checksPerYear: number | null;
  atNextCheck: number | null;
  withinFive: number | null;
  withinTwenty: number | null;
  margin: number | null;
  verdict: "too-few-days" | "no-limit" | "seen-at-once" | "seen-within-five" | "seen-within-twenty" | "cannot-be-seen";
  explanation: string;
}
