import type { Source } from "../../api/types";
import type { Profile, ProfilePoint } from "../types";

/** A point with the sign by which drawing, chart and table name it: wells by number from the aperture inwards, lips by L, cases by C. */
export interface Marked extends ProfilePoint { sign: string; hotLimitCelsius: number | null }

const letters = { lip: "L", case: "C" } as const;

export function markedPoints(profile: Profile, source: Source): Marked[] {
  const wells = profile.points.filter((point) => point.kind === "well").sort((one, other) => (one.positionMillimetre ?? Infinity) - (other.positionMillimetre ?? Infinity));
  const rest = (["lip", "case"] as const).flatMap((kind) => {
    const points = profile.points.filter((point) => point.kind === kind);
    return points.map((point, i) => ({ point, sign: points.length === 1 ? letters[kind] : `${letters[kind]}${i + 1}` }));
  });
  return [...wells.map((point, i) => ({ point, sign: String(i + 1) })), ...rest].map(({ point, sign }) => ({
    ...point,
    // A lip without a stated place is at the aperture, where the profile takes it to be.
    positionMillimetre: point.positionMillimetre ?? (point.kind === "lip" ? 0 : null),
    sign,
    hotLimitCelsius: source.channels.find((channel) => channel.id === point.channel)?.hotLimitCelsius ?? null,
  }));
}

/** Whether a surface is above the limit from which on it raises an alert. */
export const isHot = (point: Marked): boolean => point.hotLimitCelsius !== null && point.celsius !== null && !point.isSilent && point.celsius > point.hotLimitCelsius;

/** Difference from the reference in kelvin; null for the reference itself and where one of them is not known. */
export function differenceOf(point: ProfilePoint, profile: Profile): number | null {
  return point.isReference || point.isSilent || point.celsius === null || profile.reference === null ? null : point.celsius - profile.reference.celsius;
}
