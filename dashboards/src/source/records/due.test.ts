import { describe, expect, it } from "vitest";
import { dueOf } from "./due";

const now = Date.parse("2026-06-15T12:00:00Z");

describe("a due date", () => {
  it("is told in days, overdue by its own word", () => {
    expect(dueOf("2027-06-15T12:00:00Z", now)).toEqual({ state: "fine", text: "365 days left" });
    expect(dueOf("2026-06-17T00:00:00Z", now)).toEqual({ state: "soon", text: "1 day left" });
    expect(dueOf("2026-06-15T20:00:00Z", now)).toEqual({ state: "soon", text: "due within a day" });
    expect(dueOf("2026-06-13T12:00:00Z", now)).toEqual({ state: "overdue", text: "overdue by 2 days" });
    expect(dueOf(null, now)).toEqual({ state: "none", text: "no interval set" });
  });
});
