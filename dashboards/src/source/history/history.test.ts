import { describe, expect, it } from "vitest";
import type { DecisionWord, Outcome } from "../../api/types";
import { historyCsv } from "./csv";
import { limitPieces, marked, nearest, pointsOf, scopesOf, stretches, valueScale } from "./points";

const made = (minutes: number, value: number | null, over: Partial<Outcome> = {}): Outcome => ({
  id: `a${minutes}`,
  source: "s.a",
  criterion: "stability",
  scope: "",
  windowStart: new Date((minutes - 30) * 60_000).toISOString(),
  windowEnd: new Date(minutes * 60_000).toISOString(),
  revision: 1,
  value,
  expandedUncertainty: value === null ? null : 0.5,
  coverageFactor: 2,
  unit: "mK",
  limit: 7,
  decision: "pass" as DecisionWord,
  computedAt: "1970-01-01T01:00:00Z",
  ...over,
});

const points = (...all: Outcome[]) => pointsOf(all, "");

describe("the scale of a history", () => {
  it("starts at zero for sizes and holds values, uncertainties and limit", () => {
    const { ticks, cut } = valueScale(points(made(10, 4), made(20, 5)));
    expect(ticks.low).toBe(0);
    expect(ticks.high).toBeGreaterThanOrEqual(7);
    expect(cut).toBe(0);
  });
  it("is not flattened by a ramp", () => {
    const { ticks, cut } = valueScale(points(made(10, 4), made(20, 900), made(30, 5)));
    expect(ticks.high).toBeLessThan(40);
    expect(cut).toBe(1);
  });
  it("takes no notice of what was not decided", () => {
    const { ticks, cut } = valueScale(points(made(10, 4), made(20, 900, { decision: "not-decided" })));
    expect(ticks.high).toBeLessThan(10);
    expect(cut).toBe(0);
  });
  it("exists without any value", () => expect(valueScale([]).ticks.high).toBeGreaterThan(0));
  it("goes below zero where values do", () => expect(valueScale(points(made(10, -3, { limit: null }), made(20, 2, { limit: null }))).ticks.low).toBeLessThanOrEqual(-3.5));
});

describe("the line of a history", () => {
  it("breaks where windows are missing, and leaves out what has no value", () => {
    const parts = stretches(points(made(10, 1), made(20, 2), made(30, null), made(40, 3), made(200, 4)));
    expect(parts.map((part) => part.map((point) => point.value))).toEqual([[1, 2, 3], [4]]);
  });
  it("has the limit as it was", () => {
    expect(limitPieces(points(made(10, 1), made(20, 1), made(30, 1, { limit: 5 })), 2_400)).toEqual([
      { from: 600, to: 1_800, limit: 7 },
      { from: 1_800, to: 2_400, limit: 5 },
    ]);
  });
  it("finds the nearest point", () => {
    const all = points(made(10, 1), made(20, 1), made(30, 1));
    expect(nearest(all, 1_260)).toBe(1);
    expect(nearest([], 0)).toBe(-1);
  });
  it("always marks what is no plain pass, however dense", () => {
    const all = points(...Array.from({ length: 1_000 }, (_, i) => made(i * 10, 1, i === 501 ? { decision: "fail" } : i === 503 ? { revision: 2 } : {})));
    const marks = marked(all, 50);
    expect(marks.has(501)).toBe(true);
    expect(marks.has(503)).toBe(true);
    expect(marks.size).toBeLessThan(60);
  });
  it("is of one scope", () => {
    const all = [made(10, 1, { scope: "8-14" }), made(10, 2, { scope: "3-5" })];
    expect(scopesOf(all)).toEqual(["3-5", "8-14"]);
    expect(pointsOf(all, "3-5").map((point) => point.value)).toEqual([2]);
  });
});

describe("the file of a history", () => {
  it("has a head, one row an assessment, and quotes where it must", () => {
    const lines = historyCsv([made(30, 4.25, { scope: 'a "b", c' })]).split("\r\n");
    expect(lines[0]).toMatch(/^window start,window end,source/);
    expect(lines[1]).toContain('"a ""b"", c",1,4.25,0.5,2,mK,7,pass');
    expect(lines).toHaveLength(3);
  });
});
