import { useState } from "preact/hooks";
import { acknowledge, Refusal } from "../api/client";
import type { Alert } from "../api/types";
import { typeset } from "../format/words";
import { recall, remember } from "../memory";
import { announcement, applyAlert, caution } from "../state";
import { Dialog } from "./Dialog";

/** Asks who acknowledges, and makes sure that it is meant: it cannot be taken back. */
export function AcknowledgeDialog({ alert, onClose }: { alert: Alert; onClose: () => void }) {
  const [isSending, setSending] = useState(false);
  const [problems, setProblems] = useState<string[]>([]);

  const send = async (event: Event): Promise<void> => {
    event.preventDefault();
    // From the form itself: a browser that fills in the name does not always say so.
    const fields = new FormData(event.currentTarget as HTMLFormElement);
    const by = String(fields.get("name") ?? "");
    const note = String(fields.get("note") ?? "");
    setSending(true);
    try {
      applyAlert(await acknowledge(alert.id, by, note));
      remember("name", by.trim());
      announcement.value = `Acknowledged: ${alert.headline}`;
      onClose();
    } catch (failure) {
      setProblems(failure instanceof Refusal ? failure.sentences : ["The acknowledgement failed."]);
      setSending(false);
    }
  };

  return (
    <Dialog title="Acknowledge this alert?" onClose={onClose}>
      <p>
        <strong>{typeset(alert.headline)}</strong>
      </p>
      <p>
        You say that you have seen it and take it on. {alert.isHazard ? "The hazard itself stays until it is dealt with." : "The deviation itself stays until it is dealt with."} This
        goes on record under your name and <strong>cannot be undone</strong>.
      </p>
      <form onSubmit={(event) => void send(event)}>
        <label>
          Your name
          <input type="text" name="name" autocomplete="name" required maxLength={80} defaultValue={recall("name") ?? ""} />
        </label>
        <label>
          Note (what you saw or did; may stay empty)
          <textarea name="note" rows={3} maxLength={1000} />
        </label>
        <div role="alert">
          {problems.map((problem) => (
            <p key={problem} class="abnormal">
              {problem}
            </p>
          ))}
        </div>
        <div class="buttons">
          <button type="submit" class="act" disabled={isSending}>
            {isSending ? "Sending…" : "Acknowledge"}
          </button>
          <button type="button" onClick={onClose}>
            Cancel
          </button>
        </div>
      </form>
      {alert.isHazard && <p class="caution">{caution.value}</p>}
    </Dialog>
  );
}
