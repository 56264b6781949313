import { describe, expect, it } from "vitest";
import { nextRevision, type LimitEntry, type LimitRevision } from "./limits";

const entry: LimitEntry = { id: "a-stability", revision: 2, source: "a", criterion: "stability", maximum: 7, unit: "mK", rule: "guard-band", effectiveFrom: "2026-01-01T00:00:00Z", band: "8-14" };
const revision = (number: number): LimitRevision => ({ id: entry.id, reference: `${entry.id}@${number}`, revision: number, inForce: false, effectiveFrom: "", withdrawn: false, author: "", reason: "", recordedAt: "", content: null });

describe("the next revision of a limit", () => {
  it("says what the one in force says but for the changes, and follows the last on record", () =>
    expect(nextRevision([revision(1), revision(2), revision(3)], entry, { maximum: 5, rule: "guard-band", effectiveFrom: "2026-06-01T00:00:00Z", reason: "new budget" })).toEqual({
      ...entry,
      revision: 4,
      maximum: 5,
      effectiveFrom: "2026-06-01T00:00:00Z",
      reason: "new budget",
    }));
  it("follows the one in force where nothing else is known", () =>
    expect(nextRevision([], entry, { maximum: 5, rule: "guard-band", effectiveFrom: "2026-06-01T00:00:00Z", reason: "r" }).revision).toBe(3));
});
