import type { ApertureView, Cavity } from "../api/types";

/** A point of the section: millimetres along the axis from the aperture plane, and from the axis. */
export interface Point { x: number; r: number }

/** The wall of the upper half of the section, from the edge of the aperture to the axis. */
export function outline(cavity: Cavity): Point[] {
  const { radiusMillimetre: radius, lengthMillimetre: length, apertureRadiusMillimetre: aperture } = cavity;
  const depth = coneDepth(cavity);
  switch (cavity.shape) {
    case "cylinder":
      return [{ x: 0, r: aperture }, { x: 0, r: radius }, { x: length, r: radius }, { x: length, r: 0 }];
    case "cylinder-inward-cone":
      return [{ x: 0, r: aperture }, { x: 0, r: radius }, { x: length, r: radius }, { x: length - depth, r: 0 }];
    case "cylinder-outward-cone":
      return [{ x: 0, r: aperture }, { x: 0, r: radius }, { x: length, r: radius }, { x: length + depth, r: 0 }];
    case "cone":
      return [{ x: 0, r: aperture }, { x: 0, r: radius }, { x: length, r: 0 }];
    case "sphere":
      return sphere(radius, aperture);
    case "flat-plate":
      return [{ x: 0, r: radius }, { x: 0, r: 0 }];
  }
}

/** Height of the conical part: the half-angle lies between the axis and the wall. */
export function coneDepth(cavity: Cavity): number {
  const angle = cavity.coneHalfAngleDegree;
  return angle === null || !(angle > 0 && angle < 90) ? 0 : cavity.radiusMillimetre / Math.tan((angle * Math.PI) / 180);
}

function sphere(radius: number, aperture: number): Point[] {
  const start = Math.asin(Math.min(1, aperture / radius));
  const centre = radius * Math.cos(start);
  const steps = 36;
  return Array.from({ length: steps + 1 }, (_, i) => {
    const angle = start + ((Math.PI - start) * i) / steps;
    return { x: centre - radius * Math.cos(angle), r: Math.max(0, radius * Math.sin(angle)) };
  });
}

/** The same line in pieces no longer than a length, so that each piece can have a shade of its own. */
export function pieces(line: Point[], longest: number): [Point, Point][] {
  const made: [Point, Point][] = [];
  for (let i = 1; i < line.length; i++) {
    const from = line[i - 1]!;
    const to = line[i]!;
    const count = Math.max(1, Math.ceil(Math.hypot(to.x - from.x, to.r - from.r) / longest));
    for (let k = 0; k < count; k++) {
      const at = (share: number): Point => ({ x: from.x + (to.x - from.x) * share, r: from.r + (to.r - from.r) * share });
      made.push([at(k / count), at((k + 1) / count)]);
    }
  }
  return made;
}

/** Distance of the wall from the axis at a place: where the wall has two there (a re-entrant cone), the outer one. */
export function radiusAt(line: Point[], x: number): number {
  let found = 0;
  for (let i = 1; i < line.length; i++) {
    const from = line[i - 1]!;
    const to = line[i]!;
    if (Math.min(from.x, to.x) <= x && x <= Math.max(from.x, to.x)) {
      const share = to.x === from.x ? 1 : (x - from.x) / (to.x - from.x);
      found = Math.max(found, to.x === from.x ? Math.max(from.r, to.r) : from.r + (to.r - from.r) * share);
    }
  }
  return found;
}

/** Distance of the outermost ray of a view from the axis at a place, millimetres: a cone widens from the detector through its spot in the aperture plane. */
export function sightRadius(view: ApertureView, x: number): number {
  const { spotRadiusMillimetre: spot, distanceMillimetre: distance } = view;
  return view.kind === "cone" && distance > 0 ? Math.max(0, (spot * (distance + x)) / distance) : spot;
}

/** A measured temperature at a place on the axis. */
export interface Well { id: string; name: string; x: number; celsius: number | null; isReference: boolean }

/** Temperature between the wells by straight lines, and the nearest well's beyond them; null without any. */
export function interpolate(wells: Well[], x: number): number | null {
  const known = wells.filter((well): well is Well & { celsius: number } => well.celsius !== null).sort((one, other) => one.x - other.x);
  const after = known.findIndex((well) => well.x >= x);
  if (known.length === 0) {
    return null;
  }
  if (after <= 0) {
    return after === 0 ? known[0]!.celsius : known[known.length - 1]!.celsius;
  }
  const low = known[after - 1]!;
  const high = known[after]!;
  return high.x === low.x ? low.celsius : low.celsius + ((high.celsius - low.celsius) * (x - low.x)) / (high.x - low.x);
}
