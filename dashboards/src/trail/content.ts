import type { Json } from "../api/trail";
import { words } from "../format/words";

/** One fact of an entry: its name in words, its value, and whether that is an instant. */
export interface Fact { key: string; value: string; isInstant: boolean }

const instant = /^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d(\.\d+)?Z$/;

/** Everything an entry says, one fact a line; numbers stay digit by digit as they are on record. */
export function factsOf(content: { [key: string]: Json }): Fact[] {
  return Object.entries(content).flatMap(([key, value]) => facts(nameOf(key), value));
}

function facts(key: string, value: Json): Fact[] {
  if (Array.isArray(value)) {
    return value.length > 0 && value.some((item) => typeof item === "object" && item !== null)
      ? value.flatMap((item, index) => facts(`${key} ${index + 1}`, item))
      : [{ key, value: value.length === 0 ? "none" : value.map(textOf).join(", "), isInstant: false }];
  }
  if (typeof value === "object" && value !== null) {
    const inner = Object.entries(value);
    return inner.length === 0 ? [{ key, value: "none", isInstant: false }] : inner.flatMap(([name, item]) => facts(`${key}: ${nameOf(name).toLowerCase()}`, item));
  }
  return [{ key, value: textOf(value), isInstant: typeof value === "string" && instant.test(value) }];
}

function textOf(value: Json): string {
  return value === null ? "none" : typeof value === "boolean" ? (value ? "yes" : "no") : String(value);
}

/** "setPointCelsius" gives "Set point celsius"; a name with hyphens or dots stays what it is. */
const nameOf = (key: string): string => (/^[a-z]+([A-Z][a-z0-9]*)+$/.test(key) ? words(key.replaceAll(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`)) : /^[a-z-]+$/.test(key) ? words(key) : key);
