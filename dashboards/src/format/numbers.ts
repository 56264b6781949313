const minus = "−";
// A number never parts from its unit at the end of a line.
const space = "\u00a0";

/** A number with a fixed number of decimals and a true minus sign; a dash where there is none. */
export function fixed(value: number | null | undefined, decimals: number): string {
  if (value === null || value === undefined || !Number.isFinite(value)) {
    return "–";
  }
  const text = Math.abs(value).toFixed(decimals);
  const isZero = Number(text) === 0;
  return (value < 0 && !isZero ? minus : "") + text;
}

/** Decimals that show a temperature to a digit below its expanded uncertainty, 3 (mK) at most. */
export function decimalsFor(expandedUncertaintyKelvin: number | null): number {
  if (expandedUncertaintyKelvin === null || !(expandedUncertaintyKelvin > 0)) {
    return 1;
  }
  return Math.min(3, Math.max(1, 1 - Math.floor(Math.log10(expandedUncertaintyKelvin))));
}

/** A temperature in degree Celsius with its unit. */
export const celsius = (value: number | null | undefined, decimals = 2): string => `${fixed(value, decimals)}${space}°C`;

/** A temperature difference, in mK below 1 K. */
export function kelvin(value: number): string {
  return Math.abs(value) < 1 ? `${fixed(value * 1000, 0)}${space}mK` : `${fixed(value, 2)}${space}K`;
}

/** Three significant digits, for values whose uncertainty is shown beside them. */
export function significant(value: number | null, digits = 3): string {
  if (value === null || !Number.isFinite(value)) {
    return "–";
  }
  if (value === 0) {
    return "0";
  }
  const decimals = Math.max(0, Math.min(6, digits - 1 - Math.floor(Math.log10(Math.abs(value)))));
  return fixed(value, decimals);
}
