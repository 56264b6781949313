import { useState } from "preact/hooks";
import { me } from "../access/session";
import { acknowledge } from "../api/client";
import type { Alert } from "../api/types";
import { typeset } from "../format/words";
import { acknowledgeEach, byCause, type Failure } from "../hazards/acknowledging";
import { shortName } from "../hazards/board";
import { alerts, announcement, applyAlert, caution } from "../state";
import { Detail } from "./Detail";
import { Dialog } from "./Dialog";
import { GoneLine } from "./GoneHazards";

interface AcknowledgeDialogProps { chosen: Alert[]; onClose: () => void }

/** Says who will be recorded, and makes sure that it is meant: it cannot be taken back. Several at once only where all have gone. */
export function AcknowledgeDialog({ chosen, onClose }: AcknowledgeDialogProps) {
  const [left, setLeft] = useState(chosen);
  const [tried, setTried] = useState<number | null>(null);
  const [failures, setFailures] = useState<Failure[]>([]);

  const send = async (event: Event): Promise<void> => {
    event.preventDefault();
    const note = String(new FormData(event.currentTarget as HTMLFormElement).get("note") ?? "");
    setFailures([]);
    const failed = await acknowledgeEach(
      left,
      (id) => alerts.value.find((alert) => alert.id === id),
      async (alert) => applyAlert(await acknowledge(alert.id, note)),
      setTried,
    );
    if (failed.length === 0) {
      announcement.value = chosen.length === 1 ? `Acknowledged: ${typeset(chosen[0]!.headline)}` : `Acknowledged: ${chosen.length} hazards that are gone.`;
      onClose();
      return;
    }
    setLeft(failed.map((failure) => failure.alert));
    setFailures(failed);
    setTried(null);
  };

  const [one] = chosen;
  const isSending = tried !== null;
  return (
    <Dialog title={chosen.length === 1 ? "Acknowledge this alert?" : `Acknowledge ${chosen.length} hazards that are gone?`} onClose={onClose}>
      {chosen.length === 1 && one !== undefined ? (
        <>
          <p>
            <strong>{typeset(one.headline)}</strong>
          </p>
          <details>
            <summary>Details and what to do</summary>
            <Detail text={one.detail} />
          </details>
        </>
      ) : (
        <ul class="chosen" tabIndex={0} aria-label="What is acknowledged">
          {left.map((alert) => (
            <li key={alert.id}>
              <GoneLine alert={alert} />
            </li>
          ))}
        </ul>
      )}
      <p>
        You say that you have seen {chosen.length === 1 ? "it and take it on" : "each of them and take them on"}. {consequence(chosen)} This goes on record as done by{" "}
        <strong>{me.value?.displayName}</strong> (<code>{me.value?.name}</code>) and <strong>cannot be undone</strong>.
      </p>
      <form onSubmit={(event) => void send(event)}>
        <label>
          Note (what you saw or did; may stay empty)
          <textarea name="note" rows={3} maxLength={1000} autofocus />
        </label>
        {chosen.length > 1 && (
          <p role="status" class="progress">
            {isSending && (
              <>
                <progress max={left.length} value={tried} /> {tried} of {left.length}
              </>
            )}
          </p>
        )}
        <div role="alert">
          {chosen.length > 1 && failures.length > 0 && (
            <p>
              <strong>
                {chosen.length - failures.length} of {chosen.length} are acknowledged, {failures.length} {failures.length === 1 ? "is" : "are"} not:
              </strong>
            </p>
          )}
          {byCause(failures).map(({ sentences, alerts: which }) => (
            <div key={sentences.join()}>
              {sentences.map((sentence) => (
                <p key={sentence} class="abnormal">
                  {typeset(sentence)}
                </p>
              ))}
              {chosen.length > 1 && <p class="quiet">{which.map((alert) => `${shortName(alert.sourceName)}, ${alert.subjectName}`).join("; ")}</p>}
            </div>
          ))}
        </div>
        <div class="buttons">
          <button type="submit" class="act" disabled={isSending}>
            {isSending ? "Sending…" : failures.length > 0 && chosen.length > 1 ? "Try these again" : "Acknowledge"}
          </button>
          <button type="button" onClick={onClose}>
            {failures.length > 0 && chosen.length > 1 ? "Close" : "Cancel"}
          </button>
        </div>
      </form>
      {chosen.some((alert) => alert.isHazard) && <p class="caution">{caution.value}</p>}
    </Dialog>
  );
}

function consequence(chosen: Alert[]): string {
  if (chosen.every((alert) => alert.returnedAt !== null)) {
    return chosen.length === 1 ? "Its condition has gone, so that the alert ends." : "Their conditions have gone, so that the alerts end.";
  }
  return `The ${chosen[0]?.isHazard === true ? "hazard" : "deviation"} itself stays until it is dealt with.`;
}
