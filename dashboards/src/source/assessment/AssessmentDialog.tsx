import { useState } from "preact/hooks";
import type { Source } from "../../api/types";
import { clockTime, zoneName } from "../../format/time";
import { typeset } from "../../format/words";
import { Dialog } from "../../parts/Dialog";
import { now, site } from "../../state";
import { criterionMeaning, criterionName, scopeName } from "../criteria";
import { Decision } from "../Decision";
import { Failed } from "../Failed";
import { usePolled } from "../polled";
import { assessedUncertainty, assessedValue, limitText } from "../quantity";
import { seriesName } from "../drift/series";
import { readForecastsOf, readRevisions } from "../requests";
import type { FullAssessment } from "../types";
import { Figures } from "./Figures";
import { ProvenanceList } from "./ProvenanceList";
import { assessmentAddress } from "./address";

interface AssessmentDialogProps { source: Source; id: string; onClose: () => void; onOpen: (id: string) => void }

/** One assessment with all that it says and rests on, and every other revision of it. */
export function AssessmentDialog({ source, id, onClose, onOpen }: AssessmentDialogProps) {
  const polled = usePolled(id, (signal) => readRevisions(id, signal), 0);
  const revisions = polled.value ?? [];
  const assessment = revisions.find((revision) => revision.id === id);
  const isMissing = polled.failure?.status === 404 || (assessment !== undefined && assessment.source !== source.id);
  return (
    <Dialog title={assessment === undefined ? "Assessment" : `${criterionName(assessment.criterion)} of ${typeset(source.name)}`} onClose={onClose}>
      {polled.isReading && <p class="quiet">Reading…</p>}
      {isMissing ? (
        <p>This source has no assessment with the id {id}.</p>
      ) : (
        polled.failure !== null && <Failed failure={polled.failure} what="The assessment could not be read." onAgain={polled.again} />
      )}
      {assessment !== undefined && !isMissing && <Told source={source} assessment={assessment} revisions={revisions} onOpen={onOpen} />}
      <div class="buttons">
        <button type="button" onClick={onClose}>
          Close
        </button>
        {assessment !== undefined && <CopyLink address={assessmentAddress(source.id, id)} />}
      </div>
    </Dialog>
  );
}

interface ToldProps { source: Source; assessment: FullAssessment; revisions: FullAssessment[]; onOpen: (id: string) => void }

function Told({ source, assessment, revisions, onOpen }: ToldProps) {
  const zone = site.value?.timeZone ?? "UTC";
  const time = (instant: string): string => clockTime(instant, zone, now.value, true);
  const scope = scopeName(assessment.scope, source);
  const newest = revisions[revisions.length - 1]!;
  return (
    <div class="assessment">
      {newest.revision > assessment.revision && (
        <p class="abnormal">
          Superseded by revision {newest.revision}: {newest.supersedeReason}{" "}
          <button type="button" class="as-link" onClick={() => onOpen(newest.id)}>
            Show it
          </button>
        </p>
      )}
      <p class="outcome">
        <Decision decision={assessment.decision} />
        {scope !== "" && <span> · {scope}</span>}
      </p>
      {criterionMeaning(assessment.criterion) !== undefined && <p class="quiet">{criterionMeaning(assessment.criterion)}</p>}
      <p>{typeset(assessment.explanation)}</p>
      <dl class="fact-rows">
        <Row term="Value" value={assessedValue(assessment)} />
        <Row term="Expanded uncertainty" value={assessedUncertainty(assessment)} />
        <Row term="Limit" value={limitText(assessment.limit, assessment.unit)} />
        {assessment.conformityProbability !== null && <Row term="Probability of conformity (JCGM 106)" value={probability(assessment.conformityProbability)} />}
        <Row term="Window" value={`${time(assessment.windowStart)} to ${time(assessment.windowEnd)} (${zoneName(zone, Date.parse(assessment.windowEnd))})`} />
        <Row term="Computed" value={time(assessment.computedAt)} />
        <Row term="Revision" value={`${assessment.revision}${assessment.supersedeReason === null ? "" : `: ${assessment.supersedeReason}`}`} />
      </dl>
      <Figures figures={assessment.figures} />
      <Drift source={source} assessment={assessment} />
      <h3>What it was made from</h3>
      <ProvenanceList assessment={assessment} />
      {revisions.length > 1 && (
        <>
          <h3>Revisions</h3>
          <ul class="squares">
            {revisions.map((revision) => (
              <li key={revision.id}>
                {revision.id === assessment.id ? (
                  <strong>Revision {revision.revision}, shown</strong>
                ) : (
                  <button type="button" class="as-link" onClick={() => onOpen(revision.id)}>
                    Revision {revision.revision}
                  </button>
                )}
                , computed {time(revision.computedAt)}: <Decision decision={revision.decision} />, {assessedValue(revision)}
                {revision.supersedeReason !== null && `. ${revision.supersedeReason}`}
              </li>
            ))}
          </ul>
        </>
      )}
    </div>
  );
}

/** How the value had drifted up to this window. */
function Drift({ source, assessment }: { source: Source; assessment: FullAssessment }) {
  const polled = usePolled(assessment.id, (signal) => readForecastsOf(assessment.id, signal), 0);
  const items = polled.value?.items ?? [];
  return items.length === 0 ? null : (
    <>
      <h3>Drift up to this window</h3>
      {items.map((item) => (
        <p key={item.quantity}>
          {seriesName(item, source)}: {typeset(item.explanation)}
        </p>
      ))}
    </>
  );
}

const Row = ({ term, value }: { term: string; value: string }) => (
  <div>
    <dt>{term}</dt>
    <dd class="number">{value}</dd>
  </div>
);

/** A probability in percent, no closer to certainty than it is. */
export function probability(value: number): string {
  return value > 0.9995 ? "over 99.9\u00a0%" : value < 0.0005 ? "under 0.1\u00a0%" : `${(100 * value).toFixed(1)}\u00a0%`;
}

function CopyLink({ address }: { address: string }) {
  const [state, setState] = useState<"" | "copied" | "failed">("");
  const full = new URL(address, location.origin).href;
  const copy = (): void => {
    // Pages that do not come over https may not use the clipboard.
    const promise = navigator.clipboard?.writeText(full) ?? Promise.reject(new Error());
    promise.then(() => setState("copied")).catch(() => setState("failed"));
  };
  return (
    <>
      <button type="button" onClick={copy}>
        {state === "copied" ? "Link copied" : "Copy link"}
      </button>
      {state === "failed" && (
        <label>
          Link to copy
          <input type="text" readOnly value={full} onFocus={(event) => event.currentTarget.select()} />
        </label>
      )}
    </>
  );
}
