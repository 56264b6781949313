import { describe, expect, it } from "vitest";
import type { Profile, ProfilePoint } from "../types";
import { frameOf, stagger, xOf } from "./frame";
import { curveAt, isBeyond, placed, shadesOf, shareOf } from "./shades";

const well = (position: number, celsius: number | null, over: Partial<ProfilePoint> = {}): ProfilePoint => ({
  channel: `w${position}`,
  name: "",
  kind: "well",
  positionMillimetre: position,
  celsius,
  expandedUncertaintyKelvin: 0.03,
  coverageFactor: 2,
  isReference: false,
  isSilent: false,
  ...over,
});

const profile = (reference: number | null, points: ProfilePoint[]): Profile => ({
  source: "s.a",
  at: "2026-01-01T00:00:00Z",
  setPointCelsius: reference,
  reference: reference === null ? null : { celsius: reference, expandedUncertaintyKelvin: 0.03, coverageFactor: 2 },
  points,
  curve: [],
  bands: [],
  notes: [],
});

describe("the shades of the wall", () => {
  it("cover the wells with round numbers, the reference among them", () => {
    const shades = shadesOf(profile(300, [well(190, 300), well(110, 299.93), well(30, 299.71)]))!;
    expect(shades.unit).toBe("mK");
    expect([shades.ticks.low, shades.ticks.high]).toEqual([-300, 0]);
    expect(shades.ticks.values).toContain(0);
  });
  it("are in kelvin where the wells are kelvins apart", () => {
    const shades = shadesOf(profile(1200, [well(240, 1200), well(40, 1188.4)]))!;
    expect(shades.unit).toBe("K");
    expect(shades.ticks.low).toBe(-15);
  });
  it("do not make an even wall look uneven", () => {
    const shades = shadesOf(profile(37, [well(55, 37), well(10, 36.9995)]))!;
    expect(shades.ticks.high - shades.ticks.low).toBeGreaterThanOrEqual(20);
  });
  it("leave the lip out, and say that it lies beyond", () => {
    const shades = shadesOf(profile(300, [well(190, 300), well(30, 299.7), { ...well(0, 180), kind: "lip" }]))!;
    expect(shades.ticks.low).toBe(-300);
    expect(isBeyond(shades, 180)).toBe(true);
    expect(shareOf(shades, 180)).toBe(0);
    expect(shareOf(shades, 299.85)).toBeCloseTo(0.5, 9);
  });
  it("make room for the uncertainties where they are drawn", () => expect(shadesOf(profile(300, [well(190, 300), well(30, 299.98)]), true)!.ticks.low).toBeLessThanOrEqual(-50));
  it("do not exist without a reference or without wells", () => {
    expect(shadesOf(profile(null, [well(1, 30)]))).toBeNull();
    expect(shadesOf(profile(30, [well(1, null), well(2, 30, { isSilent: true })]))).toBeNull();
  });
});

describe("the axis", () => {
  const line = [{ x: 0, r: 20 }, { x: 200, r: 25 }, { x: 214, r: 0 }];
  it("has the wall, the lip and every well inside the frame", () => {
    const frame = frameOf(line, [-4, 190], 400);
    expect(xOf(frame, -4)).toBeGreaterThan(frame.left);
    expect(xOf(frame, 214)).toBeLessThan(400 - frame.right);
  });
  it("is to scale", () => {
    const frame = frameOf(line, [], 400);
    expect(xOf(frame, 100) - xOf(frame, 0)).toBeCloseTo(xOf(frame, 200) - xOf(frame, 100), 9);
  });
  it("puts labels that would meet into rows", () => {
    const rows = stagger([{ x: 100, width: 60 }, { x: 130, width: 60 }, { x: 200, width: 60 }], [0, 400]);
    expect(rows.map((label) => label.row)).toEqual([0, 1, 0]);
  });
  it("keeps labels inside the frame", () => expect(stagger([{ x: 395, width: 60 }], [0, 400])[0]!.x).toBe(370));
});

describe("the curve", () => {
  const curve = [{ positionMillimetre: 10, celsius: 1 }, { positionMillimetre: 20, celsius: 3 }];
  it("is straight between its points and level beyond them", () => {
    expect([0, 10, 15, 30].map((at) => curveAt(curve, at))).toEqual([1, 1, 2, 3]);
    expect(curveAt([], 1)).toBeNull();
  });
});

describe("points", () => {
  it("are those that have a place and a present value, aperture first", () => {
    const points = [well(100, 1), well(20, 2), well(30, 3, { isSilent: true }), well(40, null)];
    expect(placed(profile(1, points), "well").map((point) => point.positionMillimetre)).toEqual([20, 100]);
  });
});
