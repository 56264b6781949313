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
      {groups(open).map((group) => (
        <div key={group.key} class="hazard-group">
          <ul class="alert-list">
            {group.alerts.map((alert) => (
              <HazardItem key={alert.id} alert={alert} onAcknowledge={onAcknowledge} />
            ))}
          </ul>
          <Advice lines={group.advice} />
        </div>
      ))}
      <p class="caution">{caution.value}</p>
    </section>
  );
}

interface Group { key: string; advice: string[]; alerts: Alert[] }

/** Hazards with the same advice stand together, so that on a phone the advice is read once and not seven times. */
function groups(open: Alert[]): Group[] {
  const made = new Map<string, Group>();
  for (const alert of open) {
    const advice = parts(alert.detail).advice;
    const key = alert.code + advice.join();
    const group = made.get(key) ?? { key, advice, alerts: [] };
    group.alerts.push(alert);
    made.set(key, group);
  }
  return [...made.values()];
}

/** The service's words: what is the case, and what to do. Where, since and the caution stand elsewhere on the page. */
function parts(detail: string): { what: string[]; advice: string[] } {
  const lines = detail.split("\n").filter((line) => line !== "" && !/^(LabWatch is no protective device|Where: |Since: )/.test(line));
  const isAdvice = (line: string): boolean => /^(Do|Do not): /.test(line);
  return { what: lines.filter((line) => !isAdvice(line)), advice: lines.filter(isAdvice) };
}

function Advice({ lines }: { lines: string[] }) {
  return (
    <>
      {lines.map((line) => {
        const label = line.slice(0, line.indexOf(": ") + 2);
        return (
          <p key={line}>
            <strong>{label}</strong>
            {typeset(line.slice(label.length))}
          </p>
        );
      })}
    </>
  );
}

/** An alert's whole detail. */
export function Detail({ text }: { text: string }) {
  const { what, advice } = parts(text);
  return (
    <>
      {what.map((line) => (
        <p key={line}>{typeset(line)}</p>
      ))}
      <Advice lines={advice} />
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
      {parts(alert.detail).what.map((line) => (
        <p key={line} class="what">
          {typeset(line)}
        </p>
      ))}
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
