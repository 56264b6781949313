import { describe, expect, it } from "vitest";
import type { Cavity } from "../api/types";
import { coneDepth, interpolate, outline, radiusAt, sightRadius, type Well } from "./geometry";

const cavity = (shape: Cavity["shape"], over: Partial<Cavity> = {}): Cavity => ({
  shape,
  radiusMillimetre: 30,
  lengthMillimetre: 200,
  coneHalfAngleDegree: 60,
  apertureRadiusMillimetre: 20,
  coating: [],
  secondMaterial: "none",
  ...over,
});

describe("the section of a cavity", () => {
  it("starts at the edge of the aperture and ends on the axis", () => {
    for (const shape of ["cylinder", "cylinder-inward-cone", "cylinder-outward-cone", "cone", "sphere"] as const) {
      const line = outline(cavity(shape));
      expect(line[0]).toEqual(expect.objectContaining({ r: expect.closeTo(20, 9) }));
      expect(line[line.length - 1]!.r).toBeCloseTo(0, 9);
    }
  });
  it("has the cone of its half-angle: 30 mm at 60 degrees are 17.32 mm deep", () => {
    expect(coneDepth(cavity("cylinder-inward-cone"))).toBeCloseTo(17.3205, 4);
    expect(outline(cavity("cylinder-inward-cone")).at(-1)!.x).toBeCloseTo(182.6795, 4);
    expect(outline(cavity("cylinder-outward-cone")).at(-1)!.x).toBeCloseTo(217.3205, 4);
  });
  it("puts the aperture of a sphere into its plane", () => {
    const line = outline(cavity("sphere"));
    expect(line[0]!.x).toBeCloseTo(0, 9);
    expect(Math.max(...line.map((point) => point.r))).toBeCloseTo(30, 1);
  });
});

describe("the axial profile", () => {
  const well = (x: number, celsius: number | null): Well => ({ id: String(x), name: "", x, celsius, isReference: false });
  it("is straight between wells and level beyond them", () => {
    const wells = [well(200, 100), well(50, 97), well(100, null)];
    expect(interpolate(wells, 125)).toBeCloseTo(98.5, 9);
    expect(interpolate(wells, 0)).toBe(97);
    expect(interpolate(wells, 300)).toBe(100);
  });
  it("does not exist without a value", () => expect(interpolate([well(1, null)], 1)).toBeNull());
});

describe("a view", () => {
  it("of a cone has its spot in the aperture plane and widens behind it: 10 mm at 700 mm are 12 mm at 140 mm", () => {
    const view = { kind: "cone", spotRadiusMillimetre: 10, distanceMillimetre: 700, isStated: false } as const;
    expect(sightRadius(view, 0)).toBe(10);
    expect(sightRadius(view, 140)).toBeCloseTo(12, 9);
    expect(sightRadius(view, -700)).toBe(0);
  });
  it("of a beam is as wide everywhere", () => expect(sightRadius({ kind: "beam", spotRadiusMillimetre: 8, distanceMillimetre: 0, isStated: true }, 100)).toBe(8));
});

describe("the wall at a place", () => {
  it("is as far from the axis as the cylinder, and less in the cone", () => {
    const line = outline(cavity("cylinder-outward-cone"));
    expect(radiusAt(line, 100)).toBe(30);
    expect(radiusAt(line, 200 + 17.3205 / 2)).toBeCloseTo(15, 3);
  });
});
