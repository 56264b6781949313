import { unitText } from "../../format/units";
import { Dialog } from "../../parts/Dialog";
import { lineIn, numberIn, textIn } from "../../runs/form";
import { Sentences } from "../../runs/Sentences";
import { useSending } from "../../runs/sending";
import { announcement, now } from "../../state";
import { criterionName } from "../criteria";
import { limitText, plain } from "../quantity";
import { nextRevision, reviseLimit, type LimitEntry, type LimitRevision } from "./limits";

interface ReviseLimitDialogProps { limit: LimitEntry; revisions: LimitRevision[]; onClose: () => void; onDone: () => void }

/** Makes a new revision of a limit: the new value, from when, and why. The former revision stays on record and rules what was before. */
export function ReviseLimitDialog({ limit, revisions, onClose, onDone }: ReviseLimitDialogProps) {
  const { isSending, sentences, send } = useSending();
  const submit = (event: Event): void => {
    event.preventDefault();
    const fields = new FormData(event.currentTarget as HTMLFormElement);
    const from = textIn(fields, "from");
    send(async () => {
      await reviseLimit(
        nextRevision(revisions, limit, {
          maximum: numberIn(fields, "maximum"),
          rule: textIn(fields, "rule") ?? limit.rule,
          effectiveFrom: from === null ? new Date(now.value).toISOString() : `${from}:00Z`,
          reason: lineIn(fields, "reason") ?? "",
        }),
      );
      announcement.value = `The limit of ${criterionName(limit.criterion)} has a new revision.`;
      onDone();
    });
  };
  return (
    <Dialog title={`Revise the limit of ${criterionName(limit.criterion).toLowerCase()}`} onClose={onClose}>
      <p>
        In force: at most {limitText(limit.maximum, limit.unit)} ({limit.id}@{limit.revision}). It stays on record and rules what was before the new one.
      </p>
      <form onSubmit={submit}>
        <label>
          At most{unitText(limit.unit) === "" ? "" : `, ${unitText(limit.unit)}`}
          <input type="text" name="maximum" inputMode="decimal" required autofocus pattern="\s*\d+([.,]\d+)?\s*" title="A number, for example 7 or 0.05" autocomplete="off" defaultValue={plain(limit.maximum)} />
        </label>
        <label>
          Decision by
          <select name="rule">
            {[...new Set([limit.rule, "guard-band", "simple-acceptance"])].map((rule) => (
              <option key={rule} value={rule} selected={rule === limit.rule}>
                {rule.replace("-", " ")}
              </option>
            ))}
          </select>
        </label>
        <label>
          In force from, UTC (empty: now)
          <input type="datetime-local" name="from" />
        </label>
        <label>
          Reason
          <textarea name="reason" rows={2} required maxLength={1000} />
        </label>
        <Sentences sentences={sentences} />
        <div class="buttons">
          <button type="submit" class="act" disabled={isSending}>
            {isSending ? "Sending…" : "Make the revision"}
          </button>
          <button type="button" onClick={onClose}>
            Leave it as it is
          </button>
        </div>
      </form>
    </Dialog>
  );
}
