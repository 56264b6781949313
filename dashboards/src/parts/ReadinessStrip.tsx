import type { ReadinessState, Source } from "../api/types";
import { readinessWord } from "../format/words";
import { shortName, standing } from "../hazards/board";
import { alerts, sources } from "../state";
import { isCurrent } from "./freshness";
import { Icon, readinessIcon } from "./Icon";

/** The element of a source's panel. */
export const panelId = (source: Source): string => `panel-${source.source}`;

/** What a source may be taken for now: unknown where it is not heard. */
export const presentState = (source: Source): ReadinessState => (isCurrent(source) ? source.status.readiness.state : "unknown");

/** Each source's readiness in one slim line, above everything, that leads to the source. */
export function ReadinessStrip() {
  return (
    <nav class="strip" aria-label="Readiness of the sources">
      <ul>
        {sources.value.map((source) => {
          const state = presentState(source);
          const count = standing(alerts.value.filter((alert) => alert.source === source.id)).length;
          return (
            <li key={source.id}>
              <a href={`#${panelId(source)}`}>
                {count > 0 && (
                  <span class="mark hazard">
                    <Icon name="hazard" size={17} />
                    <span class="hidden">
                      {count} standing hazard{count === 1 ? "" : "s"},
                    </span>
                  </span>
                )}
                <span>{shortName(source.name)}</span>
                <strong class={`word ${state}`}>
                  <Icon name={readinessIcon[state]} size={15} /> {readinessWord[state]}
                </strong>
              </a>
            </li>
          );
        })}
      </ul>
    </nav>
  );
}
