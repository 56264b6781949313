import { whoMay } from "../access/roles";
import { can } from "../access/session";
import type { Alert } from "../api/types";
import { clockTime, span } from "../format/time";
import { typeset } from "../format/words";
import { bySource, detailParts, firstStep, gone, headlineWithin, standing, type SourceHazards } from "../hazards/board";
import { caution, hazards, link, now, site } from "../state";
import { Acknowledge } from "./Acknowledge";
import { AdviceLines } from "./Detail";
import { Fold } from "./Fold";
import { ageOf } from "./freshness";
import { GoneHazards } from "./GoneHazards";
import { Icon } from "./Icon";

/** What is hot (or may be), since when, what to do: first on the page, first on a phone. */
export function HazardBoard({ onAcknowledge }: { onAcknowledge: (alerts: Alert[]) => void }) {
  const here = standing(hazards.value);
  return (
    <section id="hazards" aria-labelledby="hazards-title" tabIndex={-1} class={here.length > 0 ? "hazards some" : "hazards"}>
      <h2 id="hazards-title">
        {here.length > 0 && <Icon name="hazard" size={24} />}
        {here.length > 0 ? `Standing hazards (${here.length})` : "Hazards"}
      </h2>
      {here.length === 0 && (
        <p>
          {link.value === "live"
            ? "No watched hazard stands. That says nothing about surfaces without a sensor: treat sources as hot or cold until measured."
            : "Hazards are not known while the service is not heard. Treat every source as hot."}
        </p>
      )}
      {bySource(here).map((group) => (
        <OneSource key={group.source} group={group} onAcknowledge={onAcknowledge} />
      ))}
      <GoneHazards alerts={gone(hazards.value)} onAcknowledge={onAcknowledge} />
      {!can("acknowledge") && hazards.value.some((alert) => alert.acknowledgedAt === null) && <p class="quiet">Only {whoMay("acknowledge")} can acknowledge.</p>}
      <p class="caution">{caution.value}</p>
    </section>
  );
}

function OneSource({ group, onAcknowledge }: { group: SourceHazards; onAcknowledge: (alerts: Alert[]) => void }) {
  const title = `hazards-of-${group.source}`;
  return (
    <div class="hazard-group">
      <h3 id={title}>{typeset(group.name)}</h3>
      <ul class="alert-list" aria-labelledby={title}>
        {group.alerts.map((alert) => (
          <HazardItem key={alert.id} alert={alert} isFirst={alert.id === group.first} onAcknowledge={onAcknowledge} />
        ))}
      </ul>
    </div>
  );
}

export function HazardItem({ alert, isFirst, onAcknowledge }: { alert: Alert; isFirst: boolean; onAcknowledge: (alerts: Alert[]) => void }) {
  const zone = site.value?.timeZone ?? "UTC";
  const { what, advice } = detailParts(alert.detail);
  const { first, rest } = firstStep(advice);
  return (
    <li id={`alert-${alert.id}`} tabIndex={-1} class={`alert hazard ${alert.state}`}>
      <div class="top-of-alert">
        <p class="headline">{typeset(headlineWithin(alert))}</p>
        <p class="since">
          Since {clockTime(alert.raisedAt, zone, now.value)} ({span(ageOf(alert.raisedAt))})
          {alert.acknowledgedAt === null ? (
            <>
              , <strong>not acknowledged</strong>
            </>
          ) : (
            <>
              . Acknowledged by {alert.acknowledgedBy} at {clockTime(alert.acknowledgedAt, zone, now.value)}
              {alert.acknowledgeNote !== null && <>: “{alert.acknowledgeNote}”</>}
            </>
          )}
        </p>
        {alert.outlook && <p class="outlook">{typeset(alert.outlook)}</p>}
        {alert.acknowledgedAt === null && <Acknowledge class="act" alert={alert} onAcknowledge={onAcknowledge} />}
      </div>
      <Fold
        class="advice"
        opensByItself={isFirst}
        summary={
          first === null ? (
            "What to do"
          ) : (
            <>
              <strong>Do: </strong>
              {typeset(first)}
            </>
          )
        }
      >
        <AdviceLines advice={rest} />
        {what.map((line) => (
          <p key={line} class="quiet">
            {typeset(line)}
          </p>
        ))}
      </Fold>
    </li>
  );
}
