import type { Power } from "./types";

/** Of each quantity the set point with most days. */
export function mostDays(items: Power[]): Power[] {
  const best = new Map<string, Power>();
  for (const item of items) {
    const key = `${item.criterion}/${item.scope}/${item.quantity}`;
    const known = best.get(key);
    if (known === undefined || item.days > known.days) {
      best.set(key, item);
    }
  }
  return [...best.values()];
}
