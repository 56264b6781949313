// What the service answers about one source, as /openapi/v1.json describes it.
import type { Assessment, Source } from "../api/types";

/** A value with its expanded uncertainty. */
export interface Stated { value: number; expandedUncertainty: number | null; coverageFactor: number | null }

export interface ProfilePoint {
  channel: string;
  name: string;
  kind: "well" | "lip" | "case";
  positionMillimetre: number | null;
  celsius: number | null;
  expandedUncertaintyKelvin: number | null;
  coverageFactor: number | null;
  isReference: boolean;
  isSilent: boolean;
}

export interface Comparator {
  channel: string;
  name: string;
  celsius: number | null;
  effectiveEmissivity: Stated | null;
  showsChangeOnly: boolean;
  refusal: string | null;
}

/** What a change is told from; its expanded uncertainty has a coverage factor of 2. */
export interface Baseline { effectiveEmissivity: number; expandedUncertainty: number | null; from: string }

export interface BandProfile {
  band: string;
  name: string;
  method: string;
  effectiveEmissivity: Stated | null;
  isothermalEffectiveEmissivity: Stated | null;
  radianceTemperatureCelsius: number | null;
  radianceTemperature: Stated | null;
  offsetMillikelvin: Stated | null;
  surroundingsCelsius: number | null;
  comparators: Comparator[];
  baseline: Baseline | null;
}

export interface Profile {
  source: string;
  at: string;
  setPointCelsius: number | null;
  reference: { celsius: number; expandedUncertaintyKelvin: number | null; coverageFactor: number | null } | null;
  points: ProfilePoint[];
  curve: { positionMillimetre: number; celsius: number }[];
  bands: BandProfile[];
  notes: string[];
}

export interface Installation {
  channel: string;
  instrument: string;
  serialNumber: string;
  description: string;
  since: string;
  certificate: string | null;
  certificateNumber: string | null;
  issuer: string | null;
  validFrom: string | null;
  dueAt: string | null;
}

export interface Limit {
  id: string;
  criterion: string;
  maximum: number;
  unit: string;
  rule: string;
  minimumCelsius: number | null;
  maximumCelsius: number | null;
  band: string | null;
  effectiveFrom: string;
}

export interface SourceDetail { source: Source; instruments: Installation[]; limits: Limit[]; assessments: Assessment[] }

export interface HourRead { hour: string; revision: number }

/** An assessment with what it was made from. */
export interface FullAssessment extends Assessment {
  standardUncertainty: number | null;
  degreesOfFreedom: number | null;
  conformityProbability: number | null;
  provenance: { readingsDigest: string; hours: HourRead[]; certificates: string[]; limit: string | null; programVersion: string; source?: string | null };
}
