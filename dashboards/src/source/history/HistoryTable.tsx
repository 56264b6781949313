import { clockTime } from "../../format/time";
import { now } from "../../state";
import { Cards, Cell } from "../Cards";
import { Decision } from "../Decision";
import { assessedUncertainty, assessedValue, limitText } from "../quantity";
import type { HistoryPoint } from "./points";

const rowsInTable = 60;
const heads = ["Window to", "Decision", "Value", "U", "Limit", "Assessment"];

/** The newest points as rows. */
export function HistoryTable({ points, zone, onOpen }: { points: HistoryPoint[]; zone: string; onOpen: (id: string) => void }) {
  const shown = [...points].reverse().slice(0, rowsInTable);
  return (
    <details>
      <summary>As a table{shown.length < points.length ? ` (the newest ${shown.length} of ${points.length}; the file has all)` : ""}</summary>
      <Cards caption="Assessments, newest first" heads={heads} isCaptionHidden>
        {shown.map(({ assessment }) => (
          <tr key={assessment.id} role="row">
            <Cell head={heads[0]!} isHeader class="number">
              {clockTime(assessment.windowEnd, zone, now.value)}
            </Cell>
            <Cell head={heads[1]!}>
              <Decision decision={assessment.decision} />
            </Cell>
            <Cell head={heads[2]!} class="number">
              {assessedValue(assessment)}
            </Cell>
            <Cell head={heads[3]!} class="number">
              {assessedUncertainty(assessment)}
            </Cell>
            <Cell head={heads[4]!} class="number">
              {limitText(assessment.limit, assessment.unit)}
            </Cell>
            <Cell head={heads[5]!}>
              <button type="button" class="as-link" onClick={() => onOpen(assessment.id)}>
                Open
              </button>
              {assessment.revision > 1 && <span class="quiet"> revision {assessment.revision}</span>}
            </Cell>
          </tr>
        ))}
      </Cards>
    </details>
  );
}
