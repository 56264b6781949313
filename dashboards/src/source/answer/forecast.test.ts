import { describe, expect, it } from "vitest";
import { forecastText } from "./forecast";

const now = Date.parse("2026-06-01T10:00:00Z");
const at = (time: string): string => `2026-06-01T${time}:00Z`;

describe("when a source can be ready", () => {
  it("is told as a span of arrival and an earliest time", () =>
    expect(forecastText({ arrivesEarliest: at("10:20"), arrivesLatest: at("10:35"), readyNotBefore: at("11:10") }, "UTC", now)).toBe(
      "At its set point between 10:20 and 10:35; ready at 11:10 at the earliest.",
    ));
  it("is in the site's zone", () => expect(forecastText({ arrivesEarliest: null, arrivesLatest: null, readyNotBefore: at("11:10") }, "Europe/Dublin", now)).toBe("Ready at 12:10 at the earliest."));
  it("leaves out what is over", () => {
    expect(forecastText({ arrivesEarliest: at("09:00"), arrivesLatest: at("10:10"), readyNotBefore: null }, "UTC", now)).toBe("At its set point by 10:10.");
    expect(forecastText({ arrivesEarliest: at("09:00"), arrivesLatest: at("09:30"), readyNotBefore: at("09:50") }, "UTC", now)).toBeNull();
    expect(forecastText(null, "UTC", now)).toBeNull();
  });
});
