import type { Point } from "../../cavity/geometry";

/** Places on the axis in pixels; the section and the chart below it share one. */
export interface Frame { width: number; left: number; right: number; from: number; to: number; unit: number }

const margins = { left: 52, right: 16 };

/** A frame that holds the wall's line and every place, millimetres from the aperture plane; the section's case sticks out by a little. */
export function frameOf(line: Point[], places: number[], width: number): Frame {
  const from = Math.min(0, ...places);
  const to = Math.max(1, ...line.map((point) => point.x), ...places);
  const spare = (to - from) * 0.06;
  const unit = (width - margins.left - margins.right) / (to - from + 2 * spare);
  return { width, left: margins.left, right: margins.right, from: from - spare, to: to + spare, unit };
}

/** A place in pixels from the left edge. */
export const xOf = (frame: Frame, millimetre: number): number => frame.left + (millimetre - frame.from) * frame.unit;

/** A label with the place it belongs to and its width, both in pixels. */
export interface Label { x: number; width: number }

/** Rows, counted from 0, and shifted places at which labels of one row do not run into each other and stay inside the frame. */
export function stagger(labels: Label[], within: [number, number], gap = 6): { x: number; row: number }[] {
  const ends: number[] = [];
  const order = labels.map((label, index) => ({ ...label, index })).sort((one, other) => one.x - other.x);
  const made: { x: number; row: number }[] = new Array(labels.length);
  for (const label of order) {
    const x = Math.min(Math.max(label.x, within[0] + label.width / 2), within[1] - label.width / 2);
    const start = x - label.width / 2;
    let row = ends.findIndex((end) => start >= end + gap);
    if (row < 0) {
      row = ends.length;
    }
    ends[row] = start + label.width;
    made[label.index] = { x, row };
  }
  return made;
}
