import { useState } from "preact/hooks";
import { can } from "../access/session";
import { sentencesOf, shelve, unshelve } from "../api/client";
import type { Alert } from "../api/types";
import { clockTime } from "../format/time";
import { typeset } from "../format/words";
import { announcement, applyAlert, now, site } from "../state";
import { Dialog } from "./Dialog";
import { Problems } from "./Problems";

const lengths = [
  { minutes: 60, text: "an hour" },
  { minutes: 240, text: "4 hours" },
  { minutes: 1440, text: "a day" },
];

/** Says that nobody is told of an alert and why, and lets who may end that or begin it. Never offered for a hazard. */
export function Shelf({ alert }: { alert: Alert }) {
  const [isOpen, setOpen] = useState(false);
  const [problems, setProblems] = useState<string[]>([]);
  const shelf = alert.shelf ?? null;
  const mayEnd = shelf !== null && can(shelf.until === null ? "revise-records" : "acknowledge");
  const act = async (work: () => Promise<Alert>, done: string): Promise<void> => {
    try {
      setProblems([]);
      applyAlert(await work());
      announcement.value = done;
      setOpen(false);
    } catch (failure) {
      setProblems(sentencesOf(failure, "Nothing was changed."));
    }
  };
  const zone = site.value?.timeZone ?? "UTC";
  if (alert.isHazard || (shelf === null && !can("acknowledge"))) {
    return null;
  }
  return (
    <>
      {shelf !== null && (
        <p class="quiet">
          <strong>{shelf.until === null ? "Out of service" : `Shelved until ${clockTime(shelf.until, zone, now.value)}`}</strong> by {shelf.by}: “{shelf.reason}”. Nobody is told meanwhile.
        </p>
      )}
      {mayEnd && (
        <button type="button" onClick={() => void act(() => unshelve(alert), "People are told of it again.")}>
          {shelf.until === null ? "Put back into service" : "End the shelf"}
          <span class="hidden">: {typeset(alert.headline)}</span>
        </button>
      )}
      {shelf === null && (
        <button type="button" onClick={() => setOpen(true)}>
          Shelve<span class="hidden">: {typeset(alert.headline)}</span>
        </button>
      )}
      {!isOpen && <Problems sentences={problems} />}
      {isOpen && (
        <Dialog title="Shelve this alert?" onClose={() => setOpen(false)}>
          <p>
            <strong>{typeset(alert.headline)}</strong>
          </p>
          <p>Nobody is told of it until the time is over. The source stays as it is judged: shelving makes nothing fit for work. It goes on record in your name.</p>
          <form
            onSubmit={(event) => {
              event.preventDefault();
              const fields = new FormData(event.currentTarget);
              const length = String(fields.get("length"));
              void act(() => shelve(alert.id, String(fields.get("reason")).trim(), length === "" ? null : Number(length)), "Nobody is told of it for a while.");
            }}
          >
            <label>
              Reason
              <textarea name="reason" rows={2} maxLength={1000} required autofocus />
            </label>
            <label>
              For
              <select name="length">
                {lengths.map(({ minutes, text }) => (
                  <option key={minutes} value={minutes}>
                    {text}
                  </option>
                ))}
                {can("revise-records") && <option value="">out of service, until it is put back</option>}
              </select>
            </label>
            <Problems sentences={problems} />
            <div class="buttons">
              <button type="submit" class="act">
                Shelve
              </button>
              <button type="button" onClick={() => setOpen(false)}>
                Cancel
              </button>
            </div>
          </form>
        </Dialog>
      )}
    </>
  );
}
