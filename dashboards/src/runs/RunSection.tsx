import { useState } from "preact/hooks";
import { can } from "../access/session";
import type { Source } from "../api/types";
import { celsius } from "../format/numbers";
import { clockTime } from "../format/time";
import { typeset, words } from "../format/words";
import { Cards, Cell } from "../source/Cards";
import { bandName } from "../source/criteria";
import { Failed } from "../source/Failed";
import type { Polled } from "../source/polled";
import { now, site } from "../state";
import { CorrectRunDialog } from "./CorrectRunDialog";
import { listRuns } from "./requests";
import { runState } from "./standing";
import type { Run, RunPage, RunStep } from "./types";

const heads = ["Job", "Item", "At", "From", "To", "By", "State"] as const;
const stateWords = { open: "Open", ended: "Ended", cancelled: "Cancelled" } as const;

/** Every run that used this source, newest first. */
export function RunSection({ source, polled }: { source: Source; polled: Polled<RunPage> }) {
  const [more, setMore] = useState<{ after: string; page: RunPage } | null>(null);
  const [correcting, setCorrecting] = useState<Run | null>(null);
  const first = polled.value;
  const isContinued = more !== null && more.after === first?.next;
  const runs = [...(first?.items ?? []), ...(isContinued ? more.page.items : [])];
  const next = isContinued ? more.page.next : (first?.next ?? null);
  const mayRecord = can("record-runs");
  const showMore = async (): Promise<void> => {
    const page = await listRuns(source.id, next).catch(() => null);
    if (page !== null && first?.next != null) {
      setMore({ after: first.next, page: { items: [...(isContinued ? more.page.items : []), ...page.items], next: page.next } });
    }
  };
  return (
    <section id="runs" tabIndex={-1} class="panel" aria-labelledby="runs-title">
      <h2 id="runs-title">Calibration runs</h2>
      {polled.failure !== null && <Failed failure={polled.failure} what="The runs could not be read." onAgain={polled.again} />}
      {first === null && polled.failure === null && <p class="quiet">Reading…</p>}
      {first !== null && runs.length === 0 && <p>No run of this source is on record yet.</p>}
      {runs.length > 0 && (
        <Cards caption="Runs, newest first" heads={mayRecord ? [...heads, "Change"] : [...heads]} isCaptionHidden>
          {runs.map((run) => (
            <RunRow key={run.id} run={run} source={source} onCorrect={mayRecord ? setCorrecting : null} />
          ))}
        </Cards>
      )}
      {next !== null && (
        <button type="button" onClick={() => void showMore()}>
          Show earlier runs
        </button>
      )}
      {correcting !== null && (
        <CorrectRunDialog
          run={correcting}
          source={source}
          onClose={() => setCorrecting(null)}
          onDone={() => {
            setCorrecting(null);
            setMore(null);
            polled.again();
          }}
        />
      )}
    </section>
  );
}

/** Steps that changed what was recorded before. */
const isChange = (step: RunStep): boolean => step.what === "corrected" || step.what === "cancelled";

function RunRow({ run, source, onCorrect }: { run: Run; source: Source; onCorrect: ((run: Run) => void) | null }) {
  const zone = site.value?.timeZone ?? "UTC";
  const band = source.bands.find((candidate) => candidate.id === run.band);
  const time = (instant: string): string => clockTime(instant, zone, now.value);
  const state = runState(run);
  return (
    <tr role="row" class={state === "cancelled" ? "is-cancelled" : ""}>
      <Cell head={heads[0]} isHeader>
        {run.jobNumber}
      </Cell>
      <Cell head={heads[1]}>{run.item}</Cell>
      <Cell head={heads[2]} class="number">
        {celsius(run.setPointCelsius)}
        {band !== undefined && `, ${bandName(band)}`}
      </Cell>
      <Cell head={heads[3]} class="number">
        {time(run.startedAt)}
      </Cell>
      <Cell head={heads[4]} class="number">
        {run.endedAt === null ? "–" : time(run.endedAt)}
      </Cell>
      <Cell head={heads[5]}>
        {run.startedBy}
        {run.endedBy !== null && run.endedBy !== run.startedBy && `, ended by ${run.endedBy}`}
      </Cell>
      <Cell head={heads[6]}>
        <strong>{stateWords[state]}</strong>
        {run.overrideReason !== null && (
          <p class="abnormal">
            Not ready at the start ({words(run.readinessAtStart).toLowerCase()}): “{typeset(run.overrideReason)}”
          </p>
        )}
        {run.steps.some(isChange) && (
          <details>
            <summary>Corrections</summary>
            <ul class="squares">
              {run.steps
                .filter(isChange)
                .map((step) => (
                  <li key={step.number}>
                    {time(step.at)}, {step.by}: {words(step.what)}
                    {step.changes.length > 0 && ` (${step.changes.map((change) => `${words(change.member.replaceAll(/([A-Z])/g, " $1")).toLowerCase()}: ${change.from ?? "nothing"} → ${change.to ?? "nothing"}`).join("; ")})`}. “{step.reason}”
                  </li>
                ))}
            </ul>
          </details>
        )}
      </Cell>
      {onCorrect !== null && (
        <Cell head="Change">
          {state !== "cancelled" && (
            <button type="button" onClick={() => onCorrect(run)}>
              Correct<span class="hidden"> the run of job {run.jobNumber}</span>
            </button>
          )}
        </Cell>
      )}
    </tr>
  );
}
