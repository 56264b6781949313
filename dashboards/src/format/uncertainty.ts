import { fixed } from "./numbers";

const space = "\u00a0";
// Neither "U =" nor "k =" parts from its number at the end of a line.
const is = `${space}=${space}`;

/**
 * Decimals with which an expanded uncertainty has two significant digits, and its value as many: JCGM 100:2008, 7.2.6.
 * Negative for uncertainties of 100 and more (tens are then rounded); null where there is no uncertainty to go by.
 */
export function decimalsOf(uncertainty: number | null | undefined): number | null {
  if (uncertainty === null || uncertainty === undefined || !Number.isFinite(uncertainty) || uncertainty <= 0) {
    return null;
  }
  const decimals = 1 - Math.floor(Math.log10(uncertainty));
  // 0.0996 rounds to 0.10, not to 0.100.
  return rounded(uncertainty, decimals) >= 10 ** (2 - decimals) ? decimals - 1 : decimals;
}

/** A number rounded to decimals, which may be negative. */
export const rounded = (value: number, decimals: number): number => Math.round(value * 10 ** decimals) / 10 ** decimals;

/** A number with decimals, which may be negative; a dash where there is none. */
export function written(value: number | null | undefined, decimals: number): string {
  if (value === null || value === undefined || !Number.isFinite(value)) {
    return "–";
  }
  return decimals >= 0 ? fixed(value, decimals) : fixed(rounded(value, decimals), 0);
}

/** An expanded uncertainty with two significant digits. */
export function uncertaintyText(uncertainty: number | null | undefined): string {
  const decimals = decimalsOf(uncertainty);
  return decimals === null ? "–" : written(uncertainty, decimals);
}

/** A value to the place of its uncertainty; without one to a number of decimals. */
export function valueText(value: number | null | undefined, uncertainty: number | null | undefined, otherwise: number): string {
  return written(value, decimalsOf(uncertainty) ?? otherwise);
}

/** A coverage factor: 2, or 2.13 where it is not a whole number. */
export const coverageText = (factor: number | null | undefined): string =>
  factor === null || factor === undefined || !Number.isFinite(factor) ? "–" : Math.abs(factor - Math.round(factor)) < 0.005 ? fixed(factor, 0) : fixed(factor, 2);

/** "U = 30 mK, k = 2"; what is missing is said. */
export function statement(uncertainty: number | null | undefined, factor: number | null | undefined, unit: string): string {
  if (decimalsOf(uncertainty) === null) {
    return "no uncertainty stated";
  }
  const tail = unit === "" ? "" : space + unit;
  return `U${is}${uncertaintyText(uncertainty)}${tail}, ${factor === null || factor === undefined ? "k not stated" : `k${is}${coverageText(factor)}`}`;
}

/** A temperature in degree Celsius to the place of its uncertainty in kelvin. */
export const celsiusText = (value: number | null | undefined, uncertainty: number | null | undefined): string => `${valueText(value, uncertainty, 2)}${space}°C`;

/** The unit in which a spread of kelvins reads best, and how many of it a kelvin has. */
export function kelvinScale(spread: number): { unit: "mK" | "K"; perKelvin: number } {
  return spread < 1 ? { unit: "mK", perKelvin: 1000 } : { unit: "K", perKelvin: 1 };
}

/** A signed difference in kelvin to the place of its uncertainty, in mK below 1 K: "+120 mK". */
export function differenceText(kelvin: number | null | undefined, uncertainty: number | null | undefined): string {
  if (kelvin === null || kelvin === undefined || !Number.isFinite(kelvin)) {
    return "–";
  }
  const { unit, perKelvin } = kelvinScale(Math.abs(kelvin));
  const text = valueText(kelvin * perKelvin, uncertainty == null ? null : uncertainty * perKelvin, unit === "mK" ? 0 : 2);
  const sign = kelvin > 0 && Number(text.replace("−", "-")) !== 0 ? "+" : "";
  return `${sign}${text}${space}${unit}`;
}

/** An expanded uncertainty in kelvin with two digits, in mK below 1 K. */
export function uncertaintyKelvin(uncertainty: number | null | undefined): string {
  if (decimalsOf(uncertainty) === null) {
    return "–";
  }
  const { unit, perKelvin } = kelvinScale(uncertainty!);
  return `${uncertaintyText(uncertainty! * perKelvin)}${space}${unit}`;
}
