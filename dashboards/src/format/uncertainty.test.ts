import { describe, expect, it } from "vitest";
import { celsiusText, coverageText, decimalsOf, differenceText, statement, uncertaintyKelvin, uncertaintyText, valueText } from "./uncertainty";

describe("an expanded uncertainty", () => {
  // JCGM 100:2008, 7.2.6: "it usually suffices to quote uc(y) and U to at most two significant digits"; and its example of a
  // mass of 100.021 47 g with uc = 0.35 mg (7.2.2).
  it("has two significant digits", () => {
    expect(uncertaintyText(0.00034567)).toBe("0.00035");
    expect(uncertaintyText(0.0349)).toBe("0.035");
    expect(uncertaintyText(1.049)).toBe("1.0");
    expect(uncertaintyText(26.4)).toBe("26");
    expect(uncertaintyText(264)).toBe("260");
  });
  it("does not gain a third digit by rounding up", () => {
    expect(uncertaintyText(0.0996)).toBe("0.10");
    expect(uncertaintyText(9.96)).toBe("10");
    expect(uncertaintyText(99.6)).toBe("100");
    expect(decimalsOf(0.0996)).toBe(2);
  });
  it("is said with its coverage factor", () => {
    expect(statement(0.0304, 2, "K")).toBe("U\u00a0=\u00a00.030\u00a0K, k\u00a0=\u00a02");
    expect(statement(0.00021, 2.13, "")).toBe("U\u00a0=\u00a00.00021, k\u00a0=\u00a02.13");
    expect(statement(0.03, null, "K")).toBe("U\u00a0=\u00a00.030\u00a0K, k not stated");
    expect(statement(null, 2, "K")).toBe("no uncertainty stated");
    expect(statement(Number.NaN, 2, "K")).toBe("no uncertainty stated");
    expect(coverageText(2.0003)).toBe("2");
  });
  it("is in mK below 1 K", () => {
    expect(uncertaintyKelvin(0.0304)).toBe("30\u00a0mK");
    expect(uncertaintyKelvin(0.0031)).toBe("3.1\u00a0mK");
    expect(uncertaintyKelvin(1.26)).toBe("1.3\u00a0K");
  });
});

describe("a value", () => {
  it("goes to the place of its uncertainty", () => {
    expect(valueText(0.998734, 0.00021, 4)).toBe("0.99873");
    expect(valueText(100.02147, 0.00035, 2)).toBe("100.02147");
    expect(celsiusText(299.98765, 0.03)).toBe("299.988\u00a0°C");
    expect(celsiusText(1499.6, 2.4)).toBe("1499.6\u00a0°C");
    expect(valueText(1234, 260, 0)).toBe("1230");
  });
  it("without one goes to the decimals asked for", () => expect(celsiusText(36.98765, null)).toBe("36.99\u00a0°C"));
  it("as a difference has a sign, and mK below 1 K", () => {
    expect(differenceText(0.1204, 0.03)).toBe("+120\u00a0mK");
    expect(differenceText(-0.1204, 0.0031)).toBe("−120.4\u00a0mK");
    expect(differenceText(-2.345, 0.2)).toBe("−2.35\u00a0K");
    expect(differenceText(0.00001, 0.03)).toBe("0\u00a0mK");
    expect(differenceText(null, 1)).toBe("–");
  });
});
