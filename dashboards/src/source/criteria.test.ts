import { describe, expect, it } from "vitest";
import type { Source } from "../api/types";
import { byOrder, criterionName, scopeName, scopeOf } from "./criteria";

const source = {
  bands: [{ id: "8-14", name: "8 to 14 um", lowerMicrometre: 8, upperMicrometre: 14 }],
  channels: [
    { id: "comparator-8-14", name: "Comparator 8 to 14 um", band: "8-14" },
    { id: "well-a", name: "Well A", band: null },
  ],
} as unknown as Source;

describe("a scope", () => {
  it("is a band by the model, or a comparator in a band", () => {
    expect(scopeOf("8-14", source)).toMatchObject({ band: { id: "8-14" }, channel: null });
    expect(scopeOf("comparator-8-14", source)).toMatchObject({ band: { id: "8-14" }, channel: "comparator-8-14" });
    expect(scopeOf("well-a", source)).toBeUndefined();
  });
  it("reads as people say it", () => {
    expect(scopeName("8-14", source)).toBe("8 to 14\u00a0µm, by model");
    expect(scopeName("comparator-8-14", source)).toBe("8 to 14\u00a0µm, by comparator");
    expect(scopeName("well-a", source)).toBe("Well A");
    expect(scopeName("", source)).toBe("");
  });
});

describe("criteria", () => {
  it("stand in the order in which people think of them, unknown ones last", () =>
    expect(["data-health", "zeta", "effective-emissivity", "stability"].sort(byOrder)).toEqual(["stability", "effective-emissivity", "data-health", "zeta"]));
  it("have names, and their code where none is known", () => expect([criterionName("data-health"), criterionName("new-one")]).toEqual(["Data health", "New one"]));
});
