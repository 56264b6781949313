import type { AlertState, DecisionWord, ReadinessState } from "../api/types";

export const readinessWord: Record<ReadinessState, string> = {
  off: "Off",
  heating: "Heating",
  cooling: "Cooling",
  settling: "Settling",
  ready: "Ready",
  "not-fit": "Not fit",
  unknown: "Unknown",
};

export const readinessMeaning: Record<ReadinessState, string> = {
  off: "The source is switched off. It can still be hot.",
  heating: "On its way up to the set point.",
  cooling: "On its way down to the set point.",
  settling: "At the set point, but not steady enough yet.",
  ready: "Steady, traceable and inside its limits: it may be calibrated with.",
  "not-fit": "Something that a calibration needs is missing or out of tolerance.",
  unknown: "There are no data to judge by.",
};

export const stateWord: Record<AlertState, string> = {
  "raised-unacknowledged": "Standing, not acknowledged",
  "raised-acknowledged": "Standing, acknowledged",
  "returned-unacknowledged": "Gone, not acknowledged",
  normal: "Over",
};

export const decisionWord: Record<DecisionWord, string> = {
  pass: "Pass",
  "conditional-pass": "Conditional pass",
  "conditional-fail": "Conditional fail",
  fail: "Fail",
  "not-decided": "Not decided",
};

export const kindWord: Record<string, string> = {
  "stirred-bath": "Stirred-bath cavity",
  "block-furnace": "Block furnace cavity",
  "graphite-tube": "Graphite-tube furnace",
  "fixed-reference": "Fixed reference",
  "flat-plate": "Flat plate",
  "fixed-point-cell": "Fixed-point cell",
};

export const figureWord: Record<string, string> = {
  "standard-deviation": "Standard deviation",
  slope: "Slope",
  "half-range": "Half-range",
};

/** A code as words, where there is no better name for it. */
export const words = (code: string): string => {
  const text = code.replaceAll("-", " ");
  return text.charAt(0).toUpperCase() + text.slice(1);
};

/** The service's texts keep to plain characters; a page writes the unit as people do, and never parts it from its number. */
export const typeset = (text: string): string => text.replaceAll(" degC", "\u00a0°C").replaceAll(/(\d) (mK|K|mm|um)\b/g, "$1\u00a0$2").replaceAll(/(\d\u00a0)um\b/g, "$1µm");
