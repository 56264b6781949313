import { describe, expect, it } from "vitest";
import type { Alert, Reason, Source } from "../api/types";
import { correctionOf } from "./correcting";
import { runState } from "./standing";
import { drawId, idGiver, isOtherSetPoint, obstaclesOf } from "./starting";
import type { NewRun, Run } from "./types";

const asked: NewRun = { id: "1", source: "s.a", jobNumber: "J-1", item: "Thermometer 7", setPointCelsius: 300, band: "8-14", note: null, overrideReason: null };
const run = (over: Partial<Run> = {}): Run => ({ ...asked, startedAt: "2026-01-01T08:00:00Z", startedBy: "ann", endedAt: null, endedBy: null, readinessAtStart: "ready", cancelled: false, steps: [], ...over });
const source = (state: string, reasons: Reason[], openAlerts: Partial<Alert>[] = []): Source =>
  ({ status: { readiness: { state, reasons }, openAlerts, newestReadingAt: "2026-01-01T08:00:00Z" } }) as unknown as Source;
const reason = (code: string, blocks = true): Reason => ({ code, text: code, blocks, passesByWaiting: false });

describe("what stands against a start", () => {
  it("is nothing where the source is ready", () => expect(obstaclesOf(source("ready", [reason("at-temperature", false)]), true, false)).toEqual({ isReady: true, reasons: [], refusal: null }));
  it("can be overridden with a reason where it only settles", () => expect(obstaclesOf(source("settling", [reason("settling")]), true, false).refusal).toBeNull());
  it("is refused to everybody where a hazard blocks", () => {
    const hot = source("not-fit", [reason("purge-lost")], [{ code: "purge-lost", isHazard: true, returnedAt: null }]);
    expect(obstaclesOf(hot, true, true).refusal).toMatch(/nobody/);
  });
  it("is refused to a technician where a certificate is overdue, not to a quality manager", () => {
    const overdue = source("not-fit", [reason("certificate")]);
    expect(obstaclesOf(overdue, true, false).refusal).toMatch(/quality manager/);
    expect(obstaclesOf(overdue, true, true).refusal).toBeNull();
  });
  it("is that nothing is known where the source is silent", () => expect(obstaclesOf(source("ready", []), false, false)).toMatchObject({ isReady: false, reasons: [{ code: "no-data" }] }));
});

describe("a start", () => {
  const { id: _, ...facts } = asked;
  let drawn = 0;
  const withId = idGiver(() => `id-${++drawn}`);
  it("that is sent twice keeps its id, so that it makes one run", () => expect([withId(facts).id, withId({ ...facts }).id]).toEqual(["id-1", "id-1"]));
  it("with other facts is another", () => expect(withId({ ...facts, item: "Thermometer 8" }).id).toBe("id-2"));
  it("draws a UUID", () => expect(drawId()).toMatch(/^[0-9a-f]{8}-[0-9a-f]{4}-4[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/));
  it("at another set point than the controller's needs a reason", () => {
    expect(isOtherSetPoint(300.4, 300)).toBe(false);
    expect(isOtherSetPoint(310, 300)).toBe(true);
    expect(isOtherSetPoint(Number.NaN, 300)).toBe(false);
    expect(isOtherSetPoint(310, null)).toBe(false);
  });
});

describe("a run", () => {
  it("is open, ended or cancelled", () => {
    expect(runState(run())).toBe("open");
    expect(runState(run({ endedAt: "2026-01-01T09:00:00Z" }))).toBe("ended");
    expect(runState(run({ cancelled: true, steps: [{ number: 2, at: "", by: "ann", what: "cancelled", reason: "wrong source", changes: [] }] }))).toBe("cancelled");
  });
});

describe("a correction", () => {
  const form = (over: Record<string, string> = {}): FormData => {
    const fields = new FormData();
    for (const [name, value] of Object.entries({ jobNumber: "J-1", item: "Thermometer 7", setPoint: "300", band: "8-14", note: "", ...over })) {
      fields.set(name, value);
    }
    return fields;
  };
  it("holds what is different and nothing else", () => expect(correctionOf(run(), form({ setPoint: " −15,5 " }), "typed wrongly")).toEqual({ setPointCelsius: -15.5, reason: "typed wrongly" }));
  it("is none where nothing is different", () => expect(correctionOf(run(), form(), "why")).toBeNull());
  it("empties nothing", () => expect(correctionOf(run({ note: "x" }), form({ band: "" }), "r")).toBeNull());
});
