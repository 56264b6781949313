import { ticksOver, type Ticks } from "../../chart/ticks";
import { kelvinScale } from "../../format/uncertainty";
import type { Profile, ProfilePoint } from "../types";

/** A point that can be drawn on the axis. */
export interface Placed extends ProfilePoint { positionMillimetre: number; celsius: number }

/** Points of a kind with a place and a present value, from the aperture inwards. */
export function placed(profile: Profile, kind: ProfilePoint["kind"]): Placed[] {
  return profile.points
    .filter((point): point is Placed => point.kind === kind && point.positionMillimetre !== null && point.celsius !== null && !point.isSilent)
    .sort((one, other) => one.positionMillimetre - other.positionMillimetre);
}

/** The temperature that differences are counted from; null where the reference is not known. */
export const referenceOf = (profile: Profile): number | null => profile.reference?.celsius ?? null;

/** The scale by which the wall is shaded and the profile is drawn: differences from the reference, in one unit. */
export interface Shades { unit: "mK" | "K"; perKelvin: number; reference: number; ticks: Ticks }

// A wall that is even within this much is not made to look uneven.
const leastSpanKelvin = 0.02;

/**
 * The scale over the wells and, where asked, their uncertainties: round numbers around the reference, which always lies on it.
 * The lip is left out: it is commonly many kelvins off and would hide the wells.
 */
export function shadesOf(profile: Profile, withUncertainty = false): Shades | null {
  const reference = referenceOf(profile);
  const wells = placed(profile, "well");
  if (reference === null || wells.length === 0) {
    return null;
  }
  const reach = (point: Placed): number => (withUncertainty ? (point.expandedUncertaintyKelvin ?? 0) : 0);
  const low = Math.min(0, ...wells.map((point) => point.celsius - reference - reach(point)));
  const high = Math.max(0, ...wells.map((point) => point.celsius - reference + reach(point)));
  const lack = Math.max(0, leastSpanKelvin - (high - low)) / 2;
  const { unit, perKelvin } = kelvinScale(high - low + 2 * lack);
  return { unit, perKelvin, reference, ticks: ticksOver((low - lack) * perKelvin, (high + lack) * perKelvin, 4) };
}

/** Where a temperature lies on the scale, 0 at its cold and 1 at its hot end, and no further than those. */
export function shareOf(shades: Shades, celsius: number): number {
  const { low, high } = shades.ticks;
  return Math.min(1, Math.max(0, ((celsius - shades.reference) * shades.perKelvin - low) / (high - low)));
}

/** Whether a temperature lies beyond the scale. */
export function isBeyond(shades: Shades, celsius: number): boolean {
  const difference = (celsius - shades.reference) * shades.perKelvin;
  return difference < shades.ticks.low - 1e-9 || difference > shades.ticks.high + 1e-9;
}

/** Temperature of the curve at a place: straight between its points, the nearest beyond them; null where there is no curve. */
export function curveAt(curve: Profile["curve"], position: number): number | null {
  const after = curve.findIndex((point) => point.positionMillimetre >= position);
  if (curve.length === 0) {
    return null;
  }
  if (after <= 0) {
    return after === 0 ? curve[0]!.celsius : curve[curve.length - 1]!.celsius;
  }
  const low = curve[after - 1]!;
  const high = curve[after]!;
  const share = (position - low.positionMillimetre) / (high.positionMillimetre - low.positionMillimetre);
  return low.celsius + share * (high.celsius - low.celsius);
}
