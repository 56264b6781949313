import { can } from "../access/session";
import type { Alert } from "../api/types";
import { typeset } from "../format/words";

interface AcknowledgeProps { alert: Alert; class?: string; onAcknowledge: (alerts: Alert[]) => void }

/** The button for one alert, for who may; a screen reader hears which. */
export function Acknowledge({ alert, onAcknowledge, ...rest }: AcknowledgeProps) {
  if (!can("acknowledge")) {
    return null;
  }
  return (
    <button type="button" class={rest.class} onClick={() => onAcknowledge([alert])}>
      Acknowledge<span class="hidden">: {typeset(alert.headline)}</span>
    </button>
  );
}
