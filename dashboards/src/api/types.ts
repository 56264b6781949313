// What the service answers, as /openapi/v1.json describes it. Times are RFC 3339 in UTC; units stand in the names.

import type { Run } from "../runs/types";

export type ReadinessState = "off" | "heating" | "cooling" | "settling" | "ready" | "not-fit" | "unknown";
export type AlertState = "raised-unacknowledged" | "raised-acknowledged" | "returned-unacknowledged" | "normal";
export type DecisionWord = "pass" | "conditional-pass" | "conditional-fail" | "fail" | "not-decided";

export interface Reason { code: string; text: string; blocks: boolean; passesByWaiting: boolean }

/** When a source on its way can be at its set point, and ready; an estimate for planning. */
export interface ReadyForecast { arrivesEarliest: string | null; arrivesLatest: string | null; readyNotBefore: string | null }

export interface Readiness { state: ReadinessState; reasons: Reason[]; expected: ReadyForecast | null }

export interface Temperature {
  celsius: number;
  expandedUncertaintyKelvin: number | null;
  coverageFactor: number | null;
  certificate: string | null;
  insideCertificateRange: boolean;
  time: string;
}

export interface NewestReading {
  channel: string;
  time: string;
  raw: number | null;
  celsius: number | null;
  quality: string[];
  isSilent: boolean;
}

export interface Alert {
  id: string;
  source: string;
  sourceName: string;
  code: string;
  subject: string;
  subjectName: string;
  priority: "low" | "medium" | "high";
  state: AlertState;
  isHazard: boolean;
  raisedAt: string;
  returnedAt: string | null;
  acknowledgedAt: string | null;
  acknowledgedBy: string | null;
  acknowledgeNote: string | null;
  headline: string;
  detail: string;
  value: number | null;
  limit: number | null;
  unit: string;
  outlook?: string | null;
  /** Why nobody is told of it for a while. */
  shelf?: { by: string; at: string; until: string | null; reason: string } | null;
}

export interface SourceStatus {
  id: string;
  readiness: Readiness;
  temperature: Temperature | null;
  setPointCelsius: number | null;
  newestReadingAt: string | null;
  isSilent: boolean;
  newest: NewestReading[];
  openAlerts: Alert[];
  /** The open calibration run. */
  run?: Run | null;
}

export interface Channel {
  id: string;
  name: string;
  quantity: string;
  unit: string;
  intervalSeconds: number;
  axialPositionMillimetre: number | null;
  isReference: boolean;
  isTouchable: boolean;
  isHazardChannel: boolean;
  band: string | null;
  hotLimitCelsius: number | null;
}

export type CavityShape = "cylinder" | "cylinder-inward-cone" | "cylinder-outward-cone" | "cone" | "sphere" | "flat-plate";

export interface Cavity {
  shape: CavityShape;
  radiusMillimetre: number;
  lengthMillimetre: number;
  coneHalfAngleDegree: number | null;
  apertureRadiusMillimetre: number;
  coating: Coating[];
  secondMaterial: "none" | "bottom" | "aperture-plate" | "bottom-and-aperture-plate";
}

export interface Coating {
  band: string;
  emissivity: number;
  emissivityStandardUncertainty: number | null;
  diffuseFraction: number;
  diffuseFractionStandardUncertainty: number | null;
  secondEmissivity: number | null;
  secondEmissivityStandardUncertainty: number | null;
}

/** How a source is looked at. */
export interface ApertureView { kind: "cone" | "beam" | "hemispherical"; spotRadiusMillimetre: number; distanceMillimetre: number; isStated: boolean }

export interface Band { id: string; name: string; lowerMicrometre: number; upperMicrometre: number }

export interface Source {
  id: string;
  site: string;
  source: string;
  name: string;
  kind: string;
  route: "contact" | "radiometric";
  minimumCelsius: number;
  maximumCelsius: number;
  purgeGas: string | null;
  cavity: Cavity;
  view: ApertureView;
  bands: Band[];
  channels: Channel[];
  status: SourceStatus;
}

export interface Figure { name: string; value: number | null; standardUncertainty: number | null; unit: string }

/** An assessment without what it was made from. */
export interface Outcome {
  id: string;
  source: string;
  criterion: string;
  scope: string;
  windowStart: string;
  windowEnd: string;
  revision: number;
  value: number | null;
  expandedUncertainty: number | null;
  coverageFactor: number | null;
  unit: string;
  limit: number | null;
  decision: DecisionWord;
  computedAt: string;
}

export interface Assessment extends Outcome { figures: Figure[]; explanation: string; supersedeReason: string | null }

export interface Site { id: string; name: string; timeZone: string; now: string; version: string; isDemo: boolean }
export interface DemoProgress { fraction: number; text: string }

export interface Snapshot {
  site: Site;
  sources: Source[];
  openAlerts: Alert[];
  assessments: Assessment[];
  demoProgress: DemoProgress | null;
  caution: string;
}

export interface Readings {
  source: string;
  channel: string;
  unit: string;
  from: string;
  to: string;
  bucketSeconds: number | null;
  time: string[];
  raw: (number | null)[];
  rawMinimum: number[] | null;
  rawMaximum: number[] | null;
  celsius: (number | null)[] | null;
  celsiusMinimum: (number | null)[] | null;
  celsiusMaximum: (number | null)[] | null;
}

export interface FaultKind {
  kind: string;
  description: string;
  unit: string;
  minimum: number;
  maximum: number;
  defaultSize: number;
  needsChannel: boolean;
}

export interface ActiveFault {
  id: string;
  kind: string;
  source: string;
  channel: string | null;
  size: number | null;
  since: string;
  until: string | null;
  isScheduled: boolean;
}

export interface Faults { kinds: FaultKind[]; active: ActiveFault[] }

export interface Finding { code: string; where: string; message: string; value: string | null; cure: string }
