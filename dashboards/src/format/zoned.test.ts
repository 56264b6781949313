import { describe, expect, it } from "vitest";
import { fieldText, instantOf, zonedText } from "./zoned";

// Rules of the zones: IANA time zone database, as the runtime carries it.
describe("a time of a zone", () => {
  it("is written to the second", () => {
    expect(zonedText("2026-07-01T11:30:05.9Z", "Europe/Dublin")).toBe("2026-07-01 12:30:05");
    expect(zonedText("2026-06-30T23:30:00Z", "Asia/Kathmandu")).toBe("2026-07-01 05:15:00");
    expect(fieldText("2026-07-01T11:30:05Z", "Europe/Dublin")).toBe("2026-07-01T12:30");
  });
  it("is an instant", () => {
    expect(instantOf("2026-07-01T12:30", "Europe/Dublin")).toBe("2026-07-01T11:30:00Z");
    expect(instantOf("2026-12-01T12:30:15", "America/New_York")).toBe("2026-12-01T17:30:15Z");
    expect(instantOf("2026-12-01T12:30", "UTC")).toBe("2026-12-01T12:30:00Z");
  });
  it("that comes twice is the first of the two", () => {
    // Ireland's clocks go back at 2026-10-25T01:00:00Z.
    expect(instantOf("2026-10-25T01:30", "Europe/Dublin")).toBe("2026-10-25T00:30:00Z");
    expect(instantOf("2026-10-25T02:30", "Europe/Dublin")).toBe("2026-10-25T02:30:00Z");
  });
  it("that clocks leave out is the time an hour later", () => {
    // Ireland's clocks go forward at 2026-03-29T01:00:00Z.
    expect(instantOf("2026-03-29T01:30", "Europe/Dublin")).toBe("2026-03-29T01:30:00Z");
    expect(zonedText("2026-03-29T01:30:00Z", "Europe/Dublin")).toBe("2026-03-29 02:30:00");
    expect(instantOf("2026-03-29T00:30", "Europe/Dublin")).toBe("2026-03-29T00:30:00Z");
  });
  it("is none where the text is none", () => {
    expect(instantOf("", "UTC")).toBeNull();
    expect(instantOf("2026-13-01T00:00", "UTC")).toBeNull();
    expect(instantOf("yesterday", "UTC")).toBeNull();
  });
});
