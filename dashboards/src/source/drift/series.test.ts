import { describe, expect, it } from "vitest";
import { isNotable, limitsOf, scaleOf } from "./series";
import type { Forecast } from "./types";

const forecast = (part: Partial<Forecast>): Forecast => ({
  criterion: "stability", scope: "", band: null, quantity: "value", unit: "mK", setPointCelsius: 37, reference: 0, limit: 10,
  days: [{ at: "2026-11-01T12:00:00Z", value: 2, count: 3 }, { at: "2026-11-02T12:00:00Z", value: 3, count: 3 }],
  slopePerYear: null, isSignificant: false, medianSlopePerYear: null, mannKendallProbability: null, autocorrelation: null, line: null,
  expected: null, earliest: null, latest: null, chart: null, assessments: 6, digest: "", explanation: "", ...part,
});

describe("a drift", () => {
  it("asks for a look when its limit is foretold, passed, or a chart signals", () => {
    expect(isNotable(forecast({}))).toBe(false);
    expect(isNotable(forecast({ isSignificant: true, expected: "2027-01-01T00:00:00Z" }))).toBe(true);
    expect(isNotable(forecast({ expected: "2027-01-01T00:00:00Z" }))).toBe(false);
    expect(isNotable(forecast({ limit: 2.5 }))).toBe(true);
  });

  it("has a limit on either side where the quantity has a sign", () => {
    expect(limitsOf(forecast({}))).toEqual([10]);
    expect(limitsOf(forecast({ quantity: "comparator-minus-model", reference: 1, limit: 4 }))).toEqual([-3, 5]);
  });

  it("is drawn large, with the limit only where that is near", () => {
    expect(scaleOf(forecast({})).high).toBeLessThan(10);
    expect(scaleOf(forecast({ limit: 4 })).high).toBeGreaterThanOrEqual(4);
  });
});
