import type { Alert, Source } from "../../api/types";
import { standing, gone } from "../../hazards/board";
import { AlertRow } from "../../parts/AlertList";
import { GoneHazards } from "../../parts/GoneHazards";
import { HazardItem } from "../../parts/HazardBoard";
import { Icon } from "../../parts/Icon";
import { alerts, caution, link } from "../../state";

interface SourceAlertsProps { source: Source; onAcknowledge: (alerts: Alert[]) => void }

/** The hazards of this source, first those that stand, with the caution; then its other open alerts. */
export function SourceAlerts({ source, onAcknowledge }: SourceAlertsProps) {
  const open = alerts.value.filter((alert) => alert.source === source.id);
  const here = standing(open);
  const others = open.filter((alert) => !alert.isHazard);
  return (
    <>
      <section id="hazards" tabIndex={-1} class={here.length > 0 ? "hazards some" : "hazards"} aria-labelledby="hazards-title">
        <h2 id="hazards-title">
          {here.length > 0 && <Icon name="hazard" size={24} />}
          {here.length > 0 ? `Standing hazards (${here.length})` : "Hazards"}
        </h2>
        {here.length === 0 && (
          <p>
            {link.value === "live"
              ? "No watched hazard of this source stands. That says nothing about surfaces without a sensor: treat the source as hot or cold until measured."
              : "Hazards are not known while the service is not heard. Treat the source as hot."}
          </p>
        )}
        <ul class="alert-list">
          {here.map((alert, i) => (
            <HazardItem key={alert.id} alert={alert} isFirst={i === here.findIndex((candidate) => candidate.acknowledgedAt === null)} onAcknowledge={onAcknowledge} />
          ))}
        </ul>
        <GoneHazards alerts={gone(open)} onAcknowledge={onAcknowledge} />
        <p class="caution">{caution.value}</p>
      </section>
      {others.length > 0 && (
        <section id="alerts" tabIndex={-1} class="panel" aria-labelledby="alerts-title">
          <h2 id="alerts-title">Open alerts of its criteria</h2>
          <ul class="alert-list">
            {others.map((alert) => (
              <AlertRow key={alert.id} alert={alert} onAcknowledge={onAcknowledge} />
            ))}
          </ul>
        </section>
      )}
    </>
  );
}
