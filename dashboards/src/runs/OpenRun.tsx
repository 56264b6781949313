import { useState } from "preact/hooks";
import { can } from "../access/session";
import { whoMay } from "../access/roles";
import type { Source } from "../api/types";
import { celsius } from "../format/numbers";
import { clockTime, span } from "../format/time";
import { typeset } from "../format/words";
import { ageOf } from "../parts/freshness";
import { bandName } from "../source/criteria";
import { now, site } from "../state";
import { CorrectRunDialog } from "./CorrectRunDialog";
import { EndRunDialog } from "./EndRunDialog";
import { StartRunDialog } from "./StartRunDialog";
import type { Run } from "./types";

interface OpenRunProps { source: Source; run: Run | null; onChanged: () => void }

/** The run that a source is used for now, and what can be done about it. */
export function OpenRun({ source, run, onChanged }: OpenRunProps) {
  const [asking, setAsking] = useState<"start" | "end" | "correct" | null>(null);
  const mayRecord = can("record-runs");
  const done = (): void => {
    setAsking(null);
    onChanged();
  };
  const close = (): void => setAsking(null);
  return (
    <section id="open-run" tabIndex={-1} class="panel" aria-labelledby="open-run-title">
      <h2 id="open-run-title">Calibration run</h2>
      {run === null ? <p>No run is open on this source.</p> : <RunFacts run={run} source={source} />}
      {mayRecord ? (
        <div class="buttons">
          {run === null ? (
            <button type="button" class="act" onClick={() => setAsking("start")}>
              Start a run
            </button>
          ) : (
            <>
              <button type="button" class="act" onClick={() => setAsking("end")}>
                End the run
              </button>
              <button type="button" onClick={() => setAsking("correct")}>
                Correct or cancel
              </button>
            </>
          )}
        </div>
      ) : (
        <p class="quiet">Runs are recorded by {whoMay("record-runs")}.</p>
      )}
      {asking === "start" && <StartRunDialog source={source} onClose={close} onStarted={done} />}
      {asking === "end" && run !== null && <EndRunDialog run={run} sourceName={source.name} onClose={close} onDone={done} />}
      {asking === "correct" && run !== null && <CorrectRunDialog run={run} source={source} onClose={close} onDone={done} />}
    </section>
  );
}

function RunFacts({ run, source }: { run: Run; source: Source }) {
  const zone = site.value?.timeZone ?? "UTC";
  const band = source.bands.find((candidate) => candidate.id === run.band);
  return (
    <>
      <p>
        <strong>Job {run.jobNumber}</strong>: {run.item}, at {celsius(run.setPointCelsius)}
        {band !== undefined && `, ${bandName(band)}`}. Open since {clockTime(run.startedAt, zone, now.value)} ({span(ageOf(run.startedAt))}), started by {run.startedBy}.
      </p>
      {run.overrideReason !== null && (
        <p class="abnormal">
          Started although the source was {run.readinessAtStart.replace("-", " ")}: “{typeset(run.overrideReason)}”
        </p>
      )}
      {run.note !== null && <p class="quiet">Note: “{run.note}”</p>}
      {source.status.setPointCelsius !== null && Math.abs(source.status.setPointCelsius - run.setPointCelsius) > 0.05 && (
        <p class="abnormal">The set point is now {celsius(source.status.setPointCelsius)}, not that of the run.</p>
      )}
    </>
  );
}
