/** Steps of an axis: round numbers (1, 2 or 5 times a power of ten) that cover a span. */
export interface Ticks { low: number; high: number; step: number; values: number[] }

/** Round steps, about as many as asked for, whose ends lie at or beyond the span's. */
export function ticksOver(low: number, high: number, about: number): Ticks {
  const span = high > low ? high - low : Math.max(Math.abs(low), 1) * 1e-3;
  const step = roundStep(span / Math.max(1, about));
  const first = Math.floor(low / step + 1e-9);
  const last = Math.ceil((high > low ? high : low + span) / step - 1e-9);
  const values = Array.from({ length: last - first + 1 }, (_, i) => clean((first + i) * step));
  return { low: clean(first * step), high: clean(last * step), step, values };
}

/** Round steps that lie inside a span whose ends stay as they are. */
export function ticksWithin(low: number, high: number, about: number): Ticks {
  const step = roundStep((high - low) / Math.max(1, about));
  const first = Math.ceil(low / step - 1e-9);
  const last = Math.floor(high / step + 1e-9);
  return { low, high, step, values: Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => clean((first + i) * step)) };
}

/** Decimals that tell two neighbouring steps apart. */
export const decimalsOfStep = (step: number): number => Math.max(0, Math.min(9, -Math.floor(Math.log10(step) + 1e-9)));

/** The smallest of 1, 2, 5, 10 times a power of ten that is not below a number. */
export function roundStep(atLeast: number): number {
  const power = 10 ** Math.floor(Math.log10(atLeast));
  const share = atLeast / power;
  return power * (share <= 1 + 1e-9 ? 1 : share <= 2 + 1e-9 ? 2 : share <= 5 + 1e-9 ? 5 : 10);
}

/** Without the dust of binary fractions: 0.30000000000000004 is 0.3. */
const clean = (value: number): number => (value === 0 ? 0 : Number(value.toPrecision(12)));
