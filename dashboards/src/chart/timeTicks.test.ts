import { describe, expect, it } from "vitest";
import { offsetOf, timeTicks } from "./timeTicks";

const at = (text: string): number => Date.parse(text) / 1000;

describe("ticks of time", () => {
  it("are on full hours of the site's zone, half-hour zones too", () => {
    const ticks = timeTicks(at("2026-07-01T00:00:00Z"), at("2026-07-01T08:00:00Z"), "Asia/Kathmandu", 8);
    expect(ticks[0]).toEqual({ at: at("2026-07-01T00:15:00Z"), text: "06:00" });
    expect(ticks.map((tick) => tick.text)).toEqual(["06:00", "07:00", "08:00", "09:00", "10:00", "11:00", "12:00", "13:00"]);
  });
  it("name the day at midnight", () => {
    const ticks = timeTicks(at("2026-06-30T18:00:00Z"), at("2026-07-01T12:00:00Z"), "Europe/Dublin", 6);
    expect(ticks.map((tick) => tick.text)).toContain("1 Jul");
  });
  it("stay on midnight across the change to winter time", () => {
    // Europe/Dublin goes back by an hour on 25 October 2026 at 01:00 UTC (Directive 2000/84/EC: last Sunday of October).
    const ticks = timeTicks(at("2026-10-23T12:00:00Z"), at("2026-10-28T12:00:00Z"), "Europe/Dublin", 6);
    expect(ticks.map((tick) => tick.at)).toEqual(["2026-10-23T23:00Z", "2026-10-24T23:00Z", "2026-10-26T00:00Z", "2026-10-27T00:00Z", "2026-10-28T00:00Z"].map(at));
  });
  it("are few enough", () => expect(timeTicks(0, 30 * 86_400, "UTC", 6).length).toBeLessThanOrEqual(7));
  it("know a zone's offset", () => expect(offsetOf(at("2026-07-01T00:00:00Z"), "Europe/Dublin")).toBe(3_600));
});
