import type { Alert } from "../api/types";
import { clockTime, span } from "../format/time";
import { stateWord, typeset } from "../format/words";
import { caution, hazards, link, now, site } from "../state";
import { ageOf } from "./freshness";
import { Icon } from "./Icon";

/** What is hot (or may be), since when, what to do: first on the page, first on a phone. */
export function HazardBoard({ onAcknowledge }: { onAcknowledge: (alert: Alert) => void }) {
  const open = hazards.value;
  return (
    <section id="hazards" aria-labelledby="hazards-title" tabIndex={-1} class={open.length > 0 ? "hazards some" : "hazards"}>
      <h2 id="hazards-title">
        {open.length > 0 && <Icon name="hazard" size={24} />}
        {open.length > 0 ? `Hazards (${open.length})` : "Hazards"}
      </h2>
      {open.length === 0 && (
        <p>
          {link.value === "live"
            ? "No watched hazard is open. That says nothing about surfaces without a sensor: treat sources as hot or cold until measured."
            : "Hazards are not known while the service is not heard. Treat every source as hot."}
        </p>
      )}
      <ul class="alert-list">
        {open.map((alert) => (
          <HazardItem key={alert.id} alert={alert} onAcknowledge={onAcknowledge} />
        ))}
      </ul>
      <p class="caution">{caution.value}</p>
    </section>
  );
}

/** The service's words, one line a part; the caution stands once below all hazards. */
export function Detail({ text }: { text: string }) {
  const lines = text.split("\n").filter((line) => line !== "" && !line.startsWith("LabWatch is no protective device") && !line.startsWith("Where: ") && !line.startsWith("Since: "));
  return (
    <>
      {lines.map((line) => {
        const label = /^(Do|Do not): /.exec(line)?.[0];
        return (
          <p key={line}>
            {label !== undefined && <strong>{label}</strong>}
            {typeset(line.slice(label?.length ?? 0))}
          </p>
        );
      })}
    </>
  );
}

function HazardItem({ alert, onAcknowledge }: { alert: Alert; onAcknowledge: (alert: Alert) => void }) {
  const zone = site.value?.timeZone ?? "UTC";
  const isOpen = alert.acknowledgedAt === null;
  return (
    <li class={`alert hazard ${alert.state}`}>
      <h3>{typeset(alert.headline)}</h3>
      <p class="since">
        <strong>{stateWord[alert.state]}</strong> · since {clockTime(alert.raisedAt, zone, now.value)} ({span(ageOf(alert.raisedAt))})
        {alert.returnedAt !== null && <> · gone at {clockTime(alert.returnedAt, zone, now.value)}</>}
      </p>
      <Detail text={alert.detail} />
      {isOpen ? (
        <button type="button" class="act" onClick={() => onAcknowledge(alert)}>
          Acknowledge<span class="hidden">: {alert.headline}</span>
        </button>
      ) : (
        <p class="quiet">
          Acknowledged by {alert.acknowledgedBy} at {clockTime(alert.acknowledgedAt!, zone, now.value)}
          {alert.acknowledgeNote !== null && <>: “{alert.acknowledgeNote}”</>}
        </p>
      )}
    </li>
  );
}
