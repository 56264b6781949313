import { describe, expect, it } from "vitest";
import type { Outcome } from "../api/types";
import { assessedUncertainty, assessedValue, limitPhrase, limitText, plain } from "./quantity";

const made = (over: Partial<Outcome>): Outcome => ({ value: 4.217, expandedUncertainty: 0.81, coverageFactor: 2.04, unit: "mK", limit: 7, ...over }) as Outcome;

describe("an assessment in words", () => {
  it("has its value to the place of U, U with two digits, and k", () => {
    expect(assessedValue(made({}))).toBe("4.22\u00a0mK");
    expect(assessedUncertainty(made({}))).toBe("U\u00a0=\u00a00.81\u00a0mK (k\u00a0=\u00a02.04)");
    expect(limitPhrase(made({}))).toBe("limit 7\u00a0mK");
  });
  it("goes over to kelvin where millikelvins would end in empty zeros", () => {
    const ramp = made({ value: 3_412, expandedUncertainty: 1_530 });
    expect([assessedValue(ramp), assessedUncertainty(ramp)]).toEqual(["3.4\u00a0K", "U\u00a0=\u00a01.5\u00a0K (k\u00a0=\u00a02.04)"]);
  });
  it("without uncertainty, value or limit says so", () => {
    expect(assessedValue(made({ value: null, expandedUncertainty: null }))).toBe("no value");
    expect(assessedUncertainty(made({ expandedUncertainty: 0 }))).toBe("no uncertainty");
    expect(limitPhrase(made({ limit: null }))).toBe("no limit in force");
    expect(assessedValue(made({ value: 0.4, expandedUncertainty: 0, unit: "%" }))).toBe("0.400\u00a0%");
  });
});

describe("a number that somebody typed", () => {
  it("stays as it was typed", () => expect([7, 0.05, 0.0015, -15.5, 0.1 + 0.2].map(plain)).toEqual(["7", "0.05", "0.0015", "−15.5", "0.3"]));
  it("as a limit has its unit", () => expect(limitText(0.002, "/")).toBe("0.002"));
});
