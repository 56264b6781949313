import { shortName } from "../hazards/board";
import { Dialog } from "../parts/Dialog";
import { announcement } from "../state";
import { NoteField } from "./fields";
import { textIn } from "./form";
import { endRun } from "./requests";
import { Sentences } from "./Sentences";
import { useSending } from "./sending";
import type { Run } from "./types";

interface RunDialogProps { run: Run; sourceName: string; onClose: () => void; onDone: () => void }

/** Ends the open run of a source. */
export function EndRunDialog({ run, sourceName, onClose, onDone }: RunDialogProps) {
  const { isSending, sentences, send } = useSending();
  const submit = (event: Event): void => {
    event.preventDefault();
    const fields = new FormData(event.currentTarget as HTMLFormElement);
    send(async () => {
      await endRun(run.id, textIn(fields, "note"));
      announcement.value = `Run of job ${run.jobNumber} on ${shortName(sourceName)} ended.`;
      onDone();
    });
  };
  return (
    <Dialog title={`End the run of job ${run.jobNumber}?`} onClose={onClose}>
      <p>
        {run.item} on {shortName(sourceName)}. The source counts as free again; the run stays on record.
      </p>
      <form onSubmit={submit}>
        <NoteField label="Note on the end (may stay empty)" />
        <Sentences sentences={sentences} />
        <div class="buttons">
          <button type="submit" class="act" disabled={isSending}>
            {isSending ? "Sending…" : "End the run"}
          </button>
          <button type="button" onClick={onClose}>
            Go on with the run
          </button>
        </div>
      </form>
    </Dialog>
  );
}
