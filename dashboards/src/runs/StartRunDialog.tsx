import { useRef, useState } from "preact/hooks";
import { can } from "../access/session";
import type { Source } from "../api/types";
import { celsius } from "../format/numbers";
import { plain } from "../source/quantity";
import { readinessWord, typeset } from "../format/words";
import { shortName } from "../hazards/board";
import { Dialog } from "../parts/Dialog";
import { isCurrent } from "../parts/freshness";
import { announcement, caution } from "../state";
import { BandField, ItemFields, NoteField, SetPointField } from "./fields";
import { lineIn, numberIn, textIn } from "./form";
import { startRun } from "./requests";
import { Sentences } from "./Sentences";
import { useSending } from "./sending";
import { presentReadiness } from "./standing";
import { drawId, idGiver, isOtherSetPoint, obstaclesOf } from "./starting";
import type { Run } from "./types";

interface StartRunDialogProps { source: Source; onClose: () => void; onStarted: (run: Run) => void }

/** Starts a calibration run: which job, which item, at which set point and band; where the source is not ready, why it is used all the same. */
export function StartRunDialog({ source, onClose, onStarted }: StartRunDialogProps) {
  const { isSending, sentences, send } = useSending();
  const fresh = isCurrent(source);
  const { isReady, reasons, refusal } = obstaclesOf(source, fresh, can("revise-records"));
  const { state } = presentReadiness(source, fresh);
  const setPoint = source.status.setPointCelsius;
  const withId = useRef(idGiver(drawId));
  const [isOther, setOther] = useState(false);
  const needsReason = !isReady || isOther;

  const submit = (event: Event): void => {
    event.preventDefault();
    const fields = new FormData(event.currentTarget as HTMLFormElement);
    send(async () => {
      const asked = withId.current({
        source: source.id,
        jobNumber: lineIn(fields, "jobNumber") ?? "",
        item: lineIn(fields, "item") ?? "",
        setPointCelsius: numberIn(fields, "setPoint"),
        band: textIn(fields, "band"),
        note: textIn(fields, "note"),
        overrideReason: lineIn(fields, "overrideReason"),
      });
      const run = await startRun(asked);
      announcement.value = `Run of job ${run.jobNumber} on ${shortName(source.name)} started.`;
      onStarted(run);
    });
  };

  return (
    <Dialog title={`Start a calibration run on ${shortName(source.name)}`} onClose={onClose}>
      {!isReady && (
        <div class="obstacles">
          <p>
            <strong>The source is not ready: {readinessWord[state].toLowerCase()}.</strong>
          </p>
          <ul class="squares">
            {reasons.map((reason) => (
              <li key={reason.code + reason.text}>{typeset(reason.text)}</li>
            ))}
          </ul>
          {refusal !== null && <p class="abnormal">{refusal}</p>}
        </div>
      )}
      <form onSubmit={submit}>
        <ItemFields />
        <SetPointField value={setPoint === null ? "" : plain(setPoint).replace("−", "-")} onValue={(value) => setOther(isOtherSetPoint(value, setPoint))} />
        {isOther && <p class="abnormal">The controller is set to {celsius(setPoint)}: the readiness was judged for that.</p>}
        <BandField source={source} value={source.bands.length === 1 ? source.bands[0]!.id : ""} />
        <NoteField />
        {needsReason && (
          <label>
            Why it is used although {isReady ? "the set point is another" : "it is not ready"} (goes on record under your name)
            <textarea name="overrideReason" rows={2} required maxLength={500} disabled={refusal !== null} />
          </label>
        )}
        <Sentences sentences={sentences} />
        <div class="buttons">
          <button type="submit" class="act" disabled={isSending || refusal !== null}>
            {isSending ? "Sending…" : isReady ? "Start the run" : "Start although not ready"}
          </button>
          <button type="button" onClick={onClose}>
            Cancel
          </button>
        </div>
      </form>
      <p class="caution">{caution.value}</p>
    </Dialog>
  );
}
