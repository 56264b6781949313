import { expect, it } from "vitest";
import { mostDays } from "./power";
import type { Power } from "./types";

const row = (setPointCelsius: number, days: number, scope = ""): Power => ({
  criterion: "stability", scope, quantity: "value", unit: "mK", setPointCelsius, days, noise: 1, checksPerYear: 250, atNextCheck: 5.3, withinFive: 2.4, withinTwenty: 1.2, margin: 8, verdict: "seen-at-once", explanation: "",
});

it("shows of each quantity the set point with most days", () => {
  expect(mostDays([row(37, 4), row(35, 9), row(39, 2), row(37, 3, "other")]).map((item) => [item.setPointCelsius, item.scope])).toEqual([[35, ""], [37, "other"]]);
});
