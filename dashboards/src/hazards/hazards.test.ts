import { describe, expect, it } from "vitest";
import { Refusal } from "../api/client";
import type { Alert } from "../api/types";
import { acknowledgeEach, byCause } from "./acknowledging";
import { bySource, detailParts, eventOf, firstStep, gone, headlineWithin, shortName, standing } from "./board";

const alert = (id: string, change: Partial<Alert> = {}): Alert => ({
  id,
  source: "hollin-vale.rowan",
  sourceName: "Rowan: block furnace 100 to 500 degC",
  code: "hot-surface",
  subject: "outer-case",
  subjectName: "Outer case",
  priority: "high",
  state: "raised-unacknowledged",
  isHazard: true,
  raisedAt: "2026-07-01T12:00:00Z",
  returnedAt: null,
  acknowledgedAt: null,
  acknowledgedBy: null,
  acknowledgeNote: null,
  headline: "Rowan: block furnace 100 to 500 degC, Outer case: this surface sensor reads 61 degC, limit 48 degC. Treat as hot.",
  detail: "",
  value: 61,
  limit: 48,
  unit: "Cel",
  ...change,
});
const over = { state: "returned-unacknowledged", returnedAt: "2026-07-01T12:10:00Z" } as const;

describe("the hazard board", () => {
  it("parts what stands from what has gone, and leaves other alerts out", () => {
    const open = [alert("1"), alert("2", over), alert("3", { isHazard: false }), alert("4", { state: "raised-acknowledged", acknowledgedAt: "2026-07-01T12:01:00Z" })];
    expect(standing(open).map((each) => each.id)).toEqual(["1", "4"]);
    expect(gone(open).map((each) => each.id)).toEqual(["2"]);
  });
  it("groups by source in the order given, and opens the first that nobody has acknowledged", () => {
    const done = { state: "raised-acknowledged", acknowledgedAt: "2026-07-01T12:01:00Z" } as const;
    const groups = bySource([alert("1", done), alert("2", { source: "hollin-vale.yew", ...done }), alert("3"), alert("4")]);
    expect(groups.map((group) => [group.source, group.alerts.map((each) => each.id), group.first])).toEqual([
      ["hollin-vale.rowan", ["1", "3", "4"], "3"],
      ["hollin-vale.yew", ["2"], null],
    ]);
  });
  it("says a source's name once, also where the service has cut it", () => {
    expect(headlineWithin(alert("1"))).toBe("Outer case: this surface sensor reads 61 degC, limit 48 degC. Treat as hot.");
    expect(headlineWithin(alert("1", { headline: "Rowan: block furnace ..., Outer case: this surface sensor now reads 40 degC." }))).toBe("Outer case: this surface sensor now reads 40 degC.");
    expect(headlineWithin(alert("1", { headline: "Something else..., Outer case" }))).toBe("Something else..., Outer case");
  });
  it("says what happened without the place", () => {
    expect(eventOf(alert("1"))).toBe("This surface sensor reads 61 degC, limit 48 degC");
    expect(eventOf(alert("1", { headline: "Rowan: block furnace 100 to 500 degC, Outer case: this surface sensor reads 61.5 degC, limit 48 degC. Treat as hot." }))).toContain("61.5 degC");
    expect(eventOf(alert("1", { headline: "Free words: as they are" }))).toBe("Free words: as they are");
  });
  it("calls a source by what stands before the colon", () => {
    expect(shortName("Rowan: block furnace")).toBe("Rowan");
    expect(shortName("Bath 3")).toBe("Bath 3");
  });
  it("keeps every word of the advice, the first step apart", () => {
    const { what, advice } = detailParts("It is hot.\nWhere: there\nSince: then\nDo: Keep away; warn others; measure.\nDo not: Do not touch; do not cover it.\nLabWatch is no protective device: x");
    expect(what).toEqual(["It is hot."]);
    expect(firstStep(advice)).toEqual({
      first: "Keep away.",
      rest: [
        { label: "Do also", text: "Warn others; measure." },
        { label: "Do not", text: "Do not touch; do not cover it." },
      ],
    });
    expect(firstStep([{ label: "Do not", text: "Do not touch." }])).toEqual({ first: null, rest: [{ label: "Do not", text: "Do not touch." }] });
  });
});

describe("acknowledging several", () => {
  const same = (id: string): Alert => alert(id, over);
  it("sends one after another and tells how far it is", async () => {
    const sent: string[] = [];
    const steps: number[] = [];
    const failures = await acknowledgeEach([alert("1", over), alert("2", over)], same, async (each) => void sent.push(each.id), (tried) => steps.push(tried));
    expect([sent, steps, failures]).toEqual([["1", "2"], [0, 1, 2], []]);
  });
  it("leaves alone what stands again", async () => {
    const sent: string[] = [];
    const failures = await acknowledgeEach([alert("1", over), alert("2", over)], (id) => (id === "1" ? alert("1") : same(id)), async (each) => void sent.push(each.id), () => undefined);
    expect(sent).toEqual(["2"]);
    expect(failures.map((failure) => failure.alert.id)).toEqual(["1"]);
    expect(failures[0]!.sentences[0]).toContain("stands again");
  });
  it("goes on after a refusal, and stops trying where nobody answers", async () => {
    const tried: string[] = [];
    const send = async (each: Alert): Promise<void> => {
      tried.push(each.id);
      if (each.id !== "2") {
        throw new Refusal(each.id === "1" ? 404 : 0, `no ${each.id}`, []);
      }
    };
    const failures = await acknowledgeEach(["1", "2", "3", "4"].map(same), same, send, () => undefined);
    expect(tried).toEqual(["1", "2", "3"]);
    expect(byCause(failures).map((cause) => [cause.sentences, cause.alerts.map((each) => each.id)])).toEqual([
      [["no 1"], ["1"]],
      [["no 3"], ["3", "4"]],
    ]);
  });
});
