import { coverageText } from "../../format/uncertainty";
import { decisionWord } from "../../format/words";
import { DecisionShape } from "../Decision";
import { isDecided, type HistoryPoint } from "./points";

const words = ["pass", "conditional-pass", "conditional-fail", "fail", "not-decided"] as const;

/** What the shapes mean, and how many of each there are. */
export function HistoryKey({ points }: { points: HistoryPoint[] }) {
  const factors = [...new Set(points.filter(isDecided).map((point) => coverageText(point.assessment.coverageFactor)))].filter((factor) => factor !== "–").sort((one, other) => Number(one) - Number(other));
  const range = factors.length === 0 ? "" : `, k = ${factors.length === 1 ? factors[0] : `${factors[0]} to ${factors[factors.length - 1]}`}`;
  return (
    <ul class="history-key">
      {words.map((decision) => {
        const count = points.filter((point) => point.assessment.decision === decision).length;
        return count === 0 ? null : (
          <li key={decision}>
            <DecisionShape decision={decision} /> {decisionWord[decision]}: {count}
          </li>
        );
      })}
      <li>
        <span class="reach-sample" aria-hidden="true" /> expanded uncertainty U{range}
      </li>
      {points.some((point) => point.assessment.revision > 1) && (
        <li>
          <span class="revised-sample" aria-hidden="true" /> revised
        </li>
      )}
    </ul>
  );
}
