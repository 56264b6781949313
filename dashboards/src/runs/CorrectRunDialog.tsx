import { useState } from "preact/hooks";
import type { Source } from "../api/types";
import { Dialog } from "../parts/Dialog";
import { plain } from "../source/quantity";
import { announcement } from "../state";
import { correctionOf } from "./correcting";
import { BandField, ItemFields, NoteField, SetPointField } from "./fields";
import { lineIn } from "./form";
import { correctRun } from "./requests";
import { Sentences } from "./Sentences";
import { useSending } from "./sending";
import type { Run } from "./types";

interface CorrectRunDialogProps { run: Run; source: Source; onClose: () => void; onDone: () => void }

/** Puts a run right or calls it off. What was recorded before stays on record; a reason is asked for. */
export function CorrectRunDialog({ run, source, onClose, onDone }: CorrectRunDialogProps) {
  const { isSending, sentences, send } = useSending();
  const [isCancelling, setCancelling] = useState(false);
  const [isUnchanged, setUnchanged] = useState(false);
  const submit = (event: Event): void => {
    event.preventDefault();
    const fields = new FormData(event.currentTarget as HTMLFormElement);
    const reason = lineIn(fields, "reason") ?? "";
    const correction = isCancelling ? { cancelled: true, reason } : correctionOf(run, fields, reason);
    setUnchanged(correction === null);
    if (correction !== null) {
      send(async () => {
        await correctRun(run.id, correction);
        announcement.value = isCancelling ? `Run of job ${run.jobNumber} cancelled.` : `Run of job ${run.jobNumber} corrected.`;
        onDone();
      });
    }
  };
  return (
    <Dialog title={`Correct the run of job ${run.jobNumber}`} onClose={onClose}>
      <p>What was recorded before stays on record beside the correction.</p>
      <form onSubmit={submit}>
        <label class="inline">
          <input type="checkbox" checked={isCancelling} onChange={(event) => setCancelling(event.currentTarget.checked)} />
          Cancel the run: the source was not used for it
        </label>
        {!isCancelling && (
          <>
            <ItemFields job={run.jobNumber} item={run.item} />
            <SetPointField value={plain(run.setPointCelsius).replace("−", "-")} />
            <BandField source={source} value={run.band ?? ""} isKept={run.band !== null} />
            <NoteField value={run.note ?? ""} />
          </>
        )}
        <label>
          Reason
          <textarea name="reason" rows={2} required maxLength={500} />
        </label>
        {isUnchanged && <Sentences sentences={["Nothing is different from what is on record."]} />}
        <Sentences sentences={sentences} />
        <div class="buttons">
          <button type="submit" class="act" disabled={isSending}>
            {isSending ? "Sending…" : isCancelling ? "Cancel the run" : "Record the correction"}
          </button>
          <button type="button" onClick={onClose}>
            Leave it as it is
          </button>
        </div>
      </form>
    </Dialog>
  );
}
