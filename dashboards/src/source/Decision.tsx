import type { DecisionWord } from "../api/types";
import { decisionWord } from "../format/words";

// A shape for each outcome, the same on the page and in the charts: circles are inside the limit, corners are not, a diamond says nothing.
export const decisionPath: Record<DecisionWord, string> = {
  pass: "M8 2a6 6 0 1 0 0 12a6 6 0 1 0 0-12z",
  "conditional-pass": "M8 2a6 6 0 1 0 0 12a6 6 0 1 0 0-12zM4.6 8h6.8",
  "conditional-fail": "M8 2L14.5 13.5H1.5zM8 6v3.4M8 11.2v.4",
  fail: "M2.5 2.5h11v11h-11zM5.2 5.2l5.6 5.6M10.8 5.2l-5.6 5.6",
  "not-decided": "M8 1.5L14.5 8L8 14.5L1.5 8z",
};

/** Whether an outcome is outside its limit. */
export const isOut = (decision: DecisionWord): boolean => decision === "fail" || decision === "conditional-fail";

export function DecisionShape({ decision, size = 16 }: { decision: DecisionWord; size?: number }) {
  return (
    <svg class={`decision-shape ${decision}`} width={size} height={size} viewBox="0 0 16 16" aria-hidden="true" focusable="false">
      <path d={decisionPath[decision]} />
    </svg>
  );
}

/** An outcome by shape and word. */
export function Decision({ decision }: { decision: DecisionWord }) {
  return (
    <span class={`decision ${isOut(decision) ? "abnormal" : ""}`}>
      <DecisionShape decision={decision} /> {decisionWord[decision]}
    </span>
  );
}
