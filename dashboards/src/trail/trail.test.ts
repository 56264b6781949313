import { describe, expect, it } from "vitest";
import { factsOf } from "./content";
import { addressOf, askedOf, filterFrom, filterOf, timeField } from "./query";
import { actionWord, actorWord, happening, subjectOf } from "./words";

const at = (query: string) => filterOf(new URLSearchParams(query));

describe("a filter of the trail", () => {
  it("is carried by the address", () => {
    const address = addressOf({ actor: "t-thorn", subject: "alert/" });
    expect(address).toBe("/trail?actor=t-thorn&subject=alert%2F");
    expect(at(address.split("?")[1]!)).toMatchObject({ actor: "t-thorn", subject: "alert/", action: "" });
    expect(addressOf(at(""))).toBe("/trail");
  });
  it("asks the service for what it says, a page at a time", () => {
    expect(askedOf(at("actor=labwatch&x=1"), null, 50).toString()).toBe("actor=labwatch&count=50");
    expect(askedOf(at("actor=labwatch"), 87, 50).toString()).toBe("actor=labwatch&after=87&count=50");
  });
  it("starts at the entry that a link names", () => {
    expect(askedOf(at("at=136"), null, 50).get("after")).toBe("137");
    expect(askedOf(at("at=136"), 80, 50).get("after")).toBe("80");
    expect(askedOf(at("at=-1"), null, 50).has("after")).toBe(false);
  });
  it("takes times of the site's zone", () => {
    const fields = new FormData();
    fields.set("from", "2026-07-01T12:30");
    fields.set("to", "soon");
    const filter = filterFrom(fields, "Europe/Dublin");
    expect(filter).toMatchObject({ from: "2026-07-01T11:30:00Z", to: "" });
    expect(timeField(filter.from, "Europe/Dublin")).toBe("2026-07-01T12:30");
    expect(timeField("soon", "Europe/Dublin")).toBe("");
  });
});

describe("an entry", () => {
  const sources = ["hollin-vale.rowan"];
  const subject = (text: string, content = {}) => subjectOf({ site: "hollin-vale", subject: text, content }, sources);
  it("says what happened, and who did it", () => {
    expect(actionWord("sign-in-refused")).toBe("Sign-in refused");
    expect(actionWord("something-new")).toBe("Something new");
    expect(happening({ action: "alert-step", content: { event: "acknowledged" } })).toBe("Alert acknowledged");
    expect(happening({ action: "alert-step", content: {} })).toBe("Alert changed its state");
    expect(actorWord("labwatch")).toBe("LabWatch itself");
    expect(actorWord("t-thorn")).toBe("t-thorn");
  });
  it("says what it is about", () => {
    expect(subject("record/limit/rowan-stability@3").text).toBe("Limit rowan-stability, revision 3");
    expect(subject("alert/019394e0-7a1b-72d8-a6e0-c4b1f2d39a87/2").text).toBe("Alert …f2d39a87, step 2");
    expect(subject("lab-import/4").text).toBe("Lab import 4");
    expect(subject("account/t-thorn").text).toBe("Account t-thorn");
    expect(subject("configuration").text).toBe("Configuration");
  });
  it("leads to the source that it is about, where there is one", () => {
    expect(subject("hour/rowan/2026-12-01T09:00:00Z/0").page).toBe("/sources/hollin-vale.rowan");
    expect(subject("assessment/1", { source: "hollin-vale.rowan" }).page).toBe("/sources/hollin-vale.rowan");
    expect(subject("assessment/1", { source: "elsewhere.rowan" }).page).toBeNull();
  });
  it("leads to its record, and to all that happened to it", () => {
    expect(subject("alert/019394e0/2")).toMatchObject({ record: "/api/v1/alerts/019394e0", whole: "alert/019394e0/" });
    expect(subject("account/t-thorn")).toMatchObject({ record: null, whole: "account/t-thorn" });
  });
  it("is opened to every fact that it carries, as it is on record", () => {
    const facts = factsOf({ setPointCelsius: 300, reason: null, isOk: true, at: "2026-12-01T09:00:00.5Z", roles: ["technician", "auditor"], after: { value: 0.020000001, notes: [] }, steps: [{ by: "t-thorn" }], "well-a.x": "y" });
    expect(facts.map(({ key, value }) => `${key} = ${value}`)).toEqual([
      "Set point celsius = 300",
      "Reason = none",
      "Is ok = yes",
      "At = 2026-12-01T09:00:00.5Z",
      "Roles = technician, auditor",
      "After: value = 0.020000001",
      "After: notes = none",
      "Steps 1: by = t-thorn",
      "well-a.x = y",
    ]);
    expect(facts.filter(({ isInstant }) => isInstant).map(({ key }) => key)).toEqual(["At"]);
  });
});
