import type { Assessment, Source } from "../../api/types";
import { clockTime, span } from "../../format/time";
import { ageOf } from "../../parts/freshness";
import { now, site } from "../../state";
import { criterionName, scopeName } from "../criteria";
import { Decision } from "../Decision";
import { assessedUncertainty, assessedValue, limitPhrase } from "../quantity";

interface BandAnswersProps { source: Source; assessments: Assessment[]; onOpen: (id: string) => void }

/** The newest decision of every criterion, by band where it has one: what the readiness rests on. */
export function BandAnswers({ source, assessments, onOpen }: BandAnswersProps) {
  if (assessments.length === 0) {
    return <p class="quiet">Nothing has been assessed yet: the first decisions come when the first windows are over.</p>;
  }
  return (
    <ul class="decisions">
        {assessments.map((assessment) => {
          const scope = scopeName(assessment.scope, source);
          return (
            <li key={assessment.id}>
              <button type="button" class="as-row" onClick={() => onOpen(assessment.id)}>
                <span class="what">
                  {criterionName(assessment.criterion)}
                  {scope !== "" && <span class="quiet"> · {scope}</span>}
                </span>
                <Decision decision={assessment.decision} />
                <span class="quiet number">
                  {assessment.value !== null && `${assessedValue(assessment)}, ${assessedUncertainty(assessment)}, ${limitPhrase(assessment)}; `}
                  window to {clockTime(assessment.windowEnd, site.value?.timeZone ?? "UTC", now.value)}, {span(ageOf(assessment.windowEnd))} ago
                </span>
              </button>
            </li>
          );
        })}
    </ul>
  );
}
