import { fixed, significant } from "../format/numbers";
import { unitText } from "../format/units";
import { coverageText, decimalsOf, uncertaintyText, valueText } from "../format/uncertainty";
import type { Outcome } from "../api/types";

const space = "\u00a0";

const tail = (unit: string): string => {
  const text = unitText(unit);
  return text === "" ? "" : space + text;
};

/** The unit that two digits of an uncertainty can be written in without zeros that say nothing: kelvin from 1000 mK on. */
function shown(assessment: Outcome): { value: number | null; uncertainty: number | null; unit: string } {
  const { value, expandedUncertainty: uncertainty, unit } = assessment;
  const isLarge = unit === "mK" && (uncertainty ?? 0) >= 1000;
  const scaled = (number: number | null): number | null => (number === null ? null : isLarge ? number / 1000 : number);
  return { value: scaled(value), uncertainty: scaled(uncertainty), unit: isLarge ? "K" : unit };
}

/** An assessment's value to the place of its uncertainty, with unit. */
export function assessedValue(assessment: Outcome): string {
  const { value, uncertainty, unit } = shown(assessment);
  if (value === null) {
    return "no value";
  }
  return `${decimalsOf(uncertainty) === null ? significant(value) : valueText(value, uncertainty, 3)}${tail(unit)}`;
}

/** "U = 0.8 mK (k = 2)", or that there is none. */
export function assessedUncertainty(assessment: Outcome): string {
  const { uncertainty, unit } = shown(assessment);
  return decimalsOf(uncertainty) === null ? "no uncertainty" : `U\u00a0=\u00a0${uncertaintyText(uncertainty)}${tail(unit)} (k\u00a0=\u00a0${coverageText(assessment.coverageFactor)})`;
}

/** "limit 7 mK", or that there is none. */
export const limitPhrase = (assessment: Outcome): string => (assessment.limit === null ? "no limit in force" : `limit ${limitText(assessment.limit, assessment.unit)}`);

/** A limit as it was written, with unit. */
export const limitText = (limit: number | null, unit: string): string => (limit === null ? "no limit" : `${plain(limit)}${tail(unit)}`);

/** A number as somebody typed it: without the dust of binary fractions. */
export const plain = (value: number): string => {
  const text = String(Number(value.toPrecision(10)));
  const point = text.indexOf(".");
  return text.includes("e") ? text : fixed(value, point < 0 ? 0 : text.length - point - 1);
};
