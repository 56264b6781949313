import type { Assessment, Band, Source } from "../api/types";
import { typeset, words } from "../format/words";

/** What each criterion is called, and the question it answers. */
const names: Record<string, string> = {
  stability: "Stability",
  settled: "Settled",
  "axial-uniformity": "Axial uniformity",
  "effective-emissivity": "Effective emissivity",
  "reference-agreement": "Agreement of the references",
  "heater-balance": "Heater balance",
  purge: "Purge",
  surroundings: "Surroundings",
  traceability: "Traceability",
  budget: "Uncertainty budget",
  "data-health": "Data health",
};

const order = Object.keys(names);

export const criterionName = (code: string): string => names[code] ?? words(code);

/** Criteria in the order in which people think of them. */
export const byOrder = (one: string, other: string): number => rank(one) - rank(other) || one.localeCompare(other);

const rank = (code: string): number => {
  const place = order.indexOf(code);
  return place < 0 ? order.length : place;
};

/** What the value of a criterion is, in one line. */
const meanings: Record<string, string> = {
  stability: "Half of the range of 10 s means of the reference thermometer over 30 minutes.",
  "axial-uniformity": "Largest difference between the means of two calibrated wells over 30 minutes.",
  "effective-emissivity": "How far the effective emissivity is from its baseline, whichever way, by the model with the live profile or by a comparator.",
  settled: "Slope of the minute means of the reference thermometer over 20 minutes.",
  "reference-agreement": "How far the difference of a redundant thermometer from the reference has moved from its baseline.",
  "heater-balance": "How far the heater power is from what its baseline predicts for this temperature, room and purge.",
  purge: "Relative humidity of the gas at the aperture at the temperature of the coldest wall, by 5 min means.",
  surroundings: "Largest distance of a condition of the room from the middle of its permitted range, in parts of half its width.",
  traceability: "Age of the oldest calibration or check that results rest on, as a part of its interval.",
  budget: "Live expanded uncertainty of the radiance temperature; the limit is the CMC.",
  "data-health": "Share of the promised readings that are missing or bad, of the worst channel, in an hour.",
};

export const criterionMeaning = (code: string): string | undefined => meanings[code];

/** What a scope names: a band (judged by the model of the cavity), or a comparator's channel in a band. */
export interface ScopeOf { band: Band; channel: string | null }

export function scopeOf(scope: string, source: Source): ScopeOf | undefined {
  const bandOf = (id: string | null | undefined): Band | undefined => source.bands.find((band) => band.id === id);
  const direct = bandOf(scope);
  if (direct !== undefined) {
    return { band: direct, channel: null };
  }
  const channel = source.channels.find((candidate) => candidate.id === scope);
  const band = bandOf(channel?.band);
  return channel === undefined || band === undefined ? undefined : { band, channel: channel.id };
}

/** A scope as people read it. */
export function scopeName(scope: string, source: Source): string {
  const found = scopeOf(scope, source);
  if (found === undefined) {
    return typeset(source.channels.find((channel) => channel.id === scope)?.name ?? scope);
  }
  return `${bandName(found.band)}, by ${found.channel === null ? "model" : "comparator"}`;
}

export const bandName = (band: { name: string }): string => typeset(band.name);

/** The newest assessments of one source, in order of criterion and scope. */
export function assessmentsOf(all: Assessment[], source: string): Assessment[] {
  return all.filter((assessment) => assessment.source === source).sort((one, other) => byOrder(one.criterion, other.criterion) || one.scope.localeCompare(other.scope));
}
