import { describe, expect, it } from "vitest";
import type { Readings } from "../api/types";
import { columnsOf, withSetPoint } from "./series";

const readings = (seconds: number[], over: Partial<Readings> = {}): Readings => ({
  source: "s.a",
  channel: "c",
  unit: "Cel",
  from: new Date(0).toISOString(),
  to: new Date(3_600_000).toISOString(),
  bucketSeconds: 10,
  time: seconds.map((second) => new Date(second * 1000).toISOString()),
  raw: seconds.map(() => 1),
  rawMinimum: seconds.map(() => 0),
  rawMaximum: seconds.map(() => 2),
  celsius: null,
  celsiusMinimum: null,
  celsiusMaximum: null,
  ...over,
});

const every = (from: number, to: number): number[] => Array.from({ length: (to - from) / 10 }, (_, i) => from + i * 10);

describe("columns", () => {
  it("have a hole and a gap where readings are missing", () => {
    const columns = columnsOf(readings([...every(0, 600), ...every(1200, 3600)]), 1);
    expect(columns.gaps).toEqual([[590, 1200]]);
    expect(columns.value.filter((value) => value === null)).toHaveLength(1);
  });
  it("show the time before the first and after the last reading as missing", () => {
    expect(columnsOf(readings(every(1000, 2000)), 1).gaps).toEqual([[0, 1000], [1990, 3600]]);
    expect(columnsOf(readings([]), 1).gaps).toEqual([[0, 3600]]);
  });
  it("have no gap where nothing is missing", () => expect(columnsOf(readings(every(0, 3600)), 1).gaps).toEqual([]));
});

describe("the set point", () => {
  const columns = columnsOf(readings(every(0, 60)), 10);
  it("is the one that was in force at each row", () => {
    const made = withSetPoint(columns, readings([0, 30], { raw: [100, 200], rawMinimum: null, rawMaximum: null }));
    expect(made.setPoint).toEqual([100, 100, 100, 200, 200, 200]);
  });
  it("is never a mean of two", () => {
    const made = withSetPoint(columns, readings([0, 20, 40], { raw: [100, 150, 200], rawMinimum: [100, 100, 200], rawMaximum: [100, 200, 200] }));
    expect(made.setPoint).toEqual([100, 100, 100, 100, 200, 200]);
  });
  it("has the first known before it, and none where there is no reading of it", () => {
    expect(withSetPoint(columns, readings([50], { raw: [7], rawMinimum: null, rawMaximum: null })).setPoint).toEqual([7, 7, 7, 7, 7, 7]);
    expect(withSetPoint(columns, readings([])).setPoint).toEqual([null, null, null, null, null, null]);
  });
});
