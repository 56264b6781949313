import { describe, expect, it } from "vitest";
import { celsius, decimalsFor, fixed, kelvin, significant } from "./numbers";
import { clockTime, span, zoneName } from "./time";

describe("numbers", () => {
  it("have a true minus sign, and zero has none", () => {
    expect(fixed(-12.345, 2)).toBe("−12.35");
    expect(fixed(-0.001, 2)).toBe("0.00");
    expect(fixed(null, 2)).toBe("–");
    expect(fixed(Number.NaN, 2)).toBe("–");
  });
  it("never part from their unit", () => expect(celsius(37)).toBe("37.00\u00a0°C"));
  it("show differences below 1 K in mK", () => {
    expect(kelvin(-0.35)).toBe("−350\u00a0mK");
    expect(kelvin(12.4)).toBe("12.40\u00a0K");
  });
  it("show one digit below the uncertainty, mK at most", () => {
    expect(decimalsFor(0.02)).toBe(3);
    expect(decimalsFor(1.2)).toBe(1);
    expect(decimalsFor(0.0004)).toBe(3);
    expect(decimalsFor(null)).toBe(1);
  });
  it("keep significant digits", () => {
    expect(significant(0.01234)).toBe("0.0123");
    expect(significant(123.4)).toBe("123");
    expect(significant(0)).toBe("0");
  });
});

describe("times", () => {
  const noon = Date.parse("2026-07-01T12:00:00Z");
  it("are of the site's zone", () => {
    expect(clockTime("2026-07-01T11:30:00Z", "Europe/Dublin", noon)).toBe("12:30");
    expect(clockTime("2026-06-30T23:30:00Z", "Europe/Dublin", noon)).toBe("00:30");
    expect(clockTime("2026-06-30T22:30:00Z", "Europe/Dublin", noon)).toBe("2026-06-30 23:30");
  });
  it("name the zone with its offset then", () => {
    expect(zoneName("Europe/Dublin", noon)).toBe("Europe/Dublin, UTC+1");
    expect(zoneName("Asia/Kathmandu", noon)).toBe("Asia/Kathmandu, UTC+5:45");
    expect(zoneName("UTC", noon)).toBe("UTC, UTC+0");
  });
  it("last in the largest unit that says enough", () => {
    expect(span(42_900)).toBe("42 s");
    expect(span(-5)).toBe("0 s");
    expect(span(12 * 60_000)).toBe("12 min");
    expect(span(150 * 60_000)).toBe("2 h 30 min");
    expect(span(72 * 3_600_000)).toBe("3 days");
  });
});
