import { describe, expect, it } from "vitest";
import { decimalsOfStep, roundStep, ticksOver, ticksWithin } from "./ticks";

describe("the steps of an axis", () => {
  it("are round and cover the span", () => {
    expect(ticksOver(-112, 34, 5)).toEqual({ low: -150, high: 50, step: 50, values: [-150, -100, -50, 0, 50] });
    expect(ticksOver(0, 0.23, 4).values).toEqual([0, 0.1, 0.2, 0.3]);
    expect(ticksOver(0.99, 1, 4).values).toEqual([0.99, 0.995, 1]);
  });
  it("exist for a span of nothing", () => {
    const ticks = ticksOver(37, 37, 4);
    expect(ticks.low).toBeLessThanOrEqual(37);
    expect(ticks.high).toBeGreaterThan(37);
  });
  it("stay inside where the ends are given", () => expect(ticksWithin(-7, 212, 4).values).toEqual([0, 100, 200]));
  it("need as many decimals as the step has", () => {
    expect(decimalsOfStep(50)).toBe(0);
    expect(decimalsOfStep(1)).toBe(0);
    expect(decimalsOfStep(0.5)).toBe(1);
    expect(decimalsOfStep(0.002)).toBe(3);
  });
  it("come in ones, twos and fives", () => expect([0.11, 0.2, 3, 6, 10].map(roundStep).map((step) => Number(step.toPrecision(3)))).toEqual([0.2, 0.2, 5, 10, 10]));
});
