import { describe, expect, it } from "vitest";
import type { Readings } from "../api/types";
import { columnsOf } from "./series";

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
