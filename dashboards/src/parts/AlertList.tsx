import { useState } from "preact/hooks";
import { whoMay } from "../access/roles";
import { can } from "../access/session";
import { listAlerts } from "../api/client";
import type { Alert } from "../api/types";
import { clockTime, span } from "../format/time";
import { stateWord, typeset } from "../format/words";
import { alerts, deviations, now, site } from "../state";
import { Acknowledge } from "./Acknowledge";
import { Detail } from "./Detail";
import { ageOf } from "./freshness";
import { Icon } from "./Icon";
import { Shelf } from "./Shelf";

/** Alerts that are no hazards, and the alerts of before. */
export function AlertList({ onAcknowledge }: { onAcknowledge: (alerts: Alert[]) => void }) {
  const open = deviations.value;
  return (
    <section id="alerts" aria-labelledby="alerts-title" tabIndex={-1} class="panel">
      <h2 id="alerts-title">Alerts</h2>
      {open.length === 0 && <p>No criterion is out of tolerance.</p>}
      {!can("acknowledge") && open.some((alert) => alert.acknowledgedAt === null) && <p class="quiet">Only {whoMay("acknowledge")} can acknowledge.</p>}
      <ul class="alert-list">
        {open.map((alert) => (
          <AlertRow key={alert.id} alert={alert} onAcknowledge={onAcknowledge} />
        ))}
      </ul>
      <Earlier />
    </section>
  );
}

export function AlertRow({ alert, onAcknowledge }: { alert: Alert; onAcknowledge?: (alerts: Alert[]) => void }) {
  const zone = site.value?.timeZone ?? "UTC";
  return (
    <li id={onAcknowledge === undefined ? undefined : `alert-${alert.id}`} tabIndex={-1} class={`alert ${alert.isHazard ? "hazard" : "deviation"} ${alert.state}`}>
      <p class="headline">
        <Icon name={alert.isHazard ? "hazard" : "deviation"} size={18} /> {typeset(alert.headline)}
      </p>
      <p class="since">
        <strong>{stateWord[alert.state]}</strong> · {alert.priority} priority · since {clockTime(alert.raisedAt, zone, now.value)}
        {alert.returnedAt === null ? ` (${span(ageOf(alert.raisedAt))})` : `, gone at ${clockTime(alert.returnedAt, zone, now.value)}`}
      </p>
      {alert.acknowledgedBy !== null && (
        <p class="quiet">
          Acknowledged by {alert.acknowledgedBy}
          {alert.acknowledgeNote !== null && <>: “{alert.acknowledgeNote}”</>}
        </p>
      )}
      {onAcknowledge !== undefined && (
        <details>
          <summary>Details and what to do</summary>
          <Detail text={alert.detail} />
        </details>
      )}
      {onAcknowledge !== undefined && alert.acknowledgedAt === null && (
        <Acknowledge alert={alert} onAcknowledge={onAcknowledge} />
      )}
      {onAcknowledge !== undefined && <Shelf alert={alert} />}
    </li>
  );
}

function Earlier() {
  const [rows, setRows] = useState<Alert[]>([]);
  const [next, setNext] = useState<string | null>(null);
  const [state, setState] = useState<"closed" | "reading" | "shown" | "failed">("closed");
  const read = async (after: string | null): Promise<void> => {
    setState("reading");
    try {
      const page = await listAlerts(after);
      setRows((before) => (after === null ? page.items : [...before, ...page.items]));
      setNext(page.next);
      setState("shown");
    } catch {
      setState("failed");
    }
  };
  const openIds = new Set(alerts.value.map((alert) => alert.id));
  const over = rows.filter((alert) => !openIds.has(alert.id));
  return (
    <div class="earlier">
      {state === "shown" && over.length === 0 && <p class="quiet">There are no earlier alerts.</p>}
      <ul class="alert-list">
        {over.map((alert) => (
          <AlertRow key={alert.id} alert={alert} />
        ))}
      </ul>
      {state === "failed" && <p class="abnormal">The alerts could not be read. Try again.</p>}
      {(state !== "shown" || next !== null) && (
        <button type="button" disabled={state === "reading"} onClick={() => void read(next)}>
          {state === "shown" ? "Show more" : "Show earlier alerts"}
        </button>
      )}
    </div>
  );
}
