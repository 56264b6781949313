import { can } from "../access/session";
import type { Alert } from "../api/types";
import { clockTime } from "../format/time";
import { typeset } from "../format/words";
import { eventOf, shortName } from "../hazards/board";
import { now, site } from "../state";
import { Acknowledge } from "./Acknowledge";
import { Fold } from "./Fold";

const shownByItself = 3;

/** Hazards that are gone and wait for somebody to say that they have seen it: a line each. */
export function GoneHazards({ alerts, onAcknowledge }: { alerts: Alert[]; onAcknowledge: (alerts: Alert[]) => void }) {
  if (alerts.length === 0) {
    return null;
  }
  return (
    <div id="gone" tabIndex={-1} class="gone">
      <Fold opensByItself={alerts.length <= shownByItself} summary={<strong>Gone, not yet acknowledged ({alerts.length})</strong>}>
        <p class="quiet">Gone where the sensor sits; other parts can still be hot. Treat each source as hot until measured.</p>
        <ul>
          {alerts.map((alert) => (
            <li key={alert.id} class="beside">
              <GoneLine alert={alert} />
              <Acknowledge alert={alert} onAcknowledge={onAcknowledge} />
            </li>
          ))}
        </ul>
      </Fold>
      {alerts.length > 1 && can("acknowledge") && (
        <button type="button" class="all" onClick={() => onAcknowledge(alerts)}>
          Acknowledge these<span class="hidden"> {alerts.length} hazards that are gone</span>
        </button>
      )}
    </div>
  );
}

/** Where, what, and from when to when. */
export function GoneLine({ alert }: { alert: Alert }) {
  const zone = site.value?.timeZone ?? "UTC";
  return (
    <p>
      <strong>
        {shortName(alert.sourceName)}, {alert.subjectName}
      </strong>{" "}
      {typeset(eventOf(alert))}{" "}
      <span class="quiet times">
        {clockTime(alert.raisedAt, zone, now.value)}
        {alert.returnedAt !== null && <> to {clockTime(alert.returnedAt, zone, now.value)}</>}
      </span>
    </p>
  );
}
