import { Refusal } from "../api/client";
import type { Alert } from "../api/types";

export interface Failure { alert: Alert; sentences: string[] }

const standsAgain = ["It stands again since this was opened. Look at it, and acknowledge it by itself."];

/**
 * Acknowledges one after another. What had gone when it was chosen and has come back since is left alone: its
 * acknowledgement would be for a hazard that nobody has looked at. Where the service does not answer, the rest is not tried.
 */
export async function acknowledgeEach(
  chosen: Alert[],
  current: (id: string) => Alert | undefined,
  send: (alert: Alert) => Promise<void>,
  onProgress: (tried: number) => void,
): Promise<Failure[]> {
  const failures: Failure[] = [];
  let away: string[] | null = null;
  for (const [index, alert] of chosen.entries()) {
    onProgress(index);
    const today = current(alert.id);
    if (alert.returnedAt !== null && today !== undefined && today.returnedAt === null) {
      failures.push({ alert, sentences: standsAgain });
    } else if (away !== null) {
      failures.push({ alert, sentences: away });
    } else {
      try {
        await send(alert);
      } catch (failure) {
        const sentences = failure instanceof Refusal ? failure.sentences : ["The acknowledgement failed."];
        away = failure instanceof Refusal && failure.status === 0 ? sentences : null;
        failures.push({ alert, sentences });
      }
    }
  }
  onProgress(chosen.length);
  return failures;
}

/** Failures with the same words together, so that one cause is read once. */
export function byCause(failures: Failure[]): { sentences: string[]; alerts: Alert[] }[] {
  const made = new Map<string, { sentences: string[]; alerts: Alert[] }>();
  for (const { alert, sentences } of failures) {
    const key = sentences.join("\n");
    const cause = made.get(key) ?? { sentences, alerts: [] };
    cause.alerts.push(alert);
    made.set(key, cause);
  }
  return [...made.values()];
}
