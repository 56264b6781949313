import { applyAlert, applyAssessment, applyProgress, applySnapshot, applyStatus, heard, lost } from "../state";
import type { Alert, Assessment, DemoProgress, Snapshot, SourceStatus } from "./types";

// Without a word for this long the link counts as lost even where the browser still believes in it:
// the service sends its clock every five seconds where nothing else happens.
const patienceMilliseconds = 15_000;
const againMilliseconds = 3_000;

let source: EventSource | undefined;
let watchdog: number | undefined;
let onRefused: () => Promise<void> = () => Promise.resolve();

/** Says what to do where the service answers with something that is no stream: the session may be over. */
export function whenRefused(act: () => Promise<void>): void {
  onRefused = act;
}

/** Listens to changes until told to stop, and comes back by itself after every loss. */
export function listen(): void {
  stopListening();
  const mine = new EventSource("/api/v1/stream");
  source = mine;
  mine.addEventListener("error", () => {
    lost();
    // A browser gives up for good after an answer that is no stream (a sign-in that is over, a proxy's error page, the service starting).
    if (mine.readyState === EventSource.CLOSED && source === mine) {
      window.clearTimeout(watchdog);
      watchdog = window.setTimeout(listen, againMilliseconds);
      void onRefused();
    }
  });
  on<Snapshot>("snapshot", applySnapshot);
  on<{ now: string; status: SourceStatus }>("source", (event) => applyStatus(event.now, event.status));
  on<Alert>("alert", applyAlert);
  on<Assessment>("assessment", applyAssessment);
  on<DemoProgress>("progress", applyProgress);
  on<{ now: string }>("clock", (event) => heard(event.now));
  rearm();
}

/** Stops listening: what is shown is old from now on. */
export function stopListening(): void {
  window.clearTimeout(watchdog);
  source?.close();
  source = undefined;
  lost();
}

function on<T>(name: string, apply: (value: T) => void): void {
  source?.addEventListener(name, (event) => {
    rearm();
    apply(JSON.parse((event as MessageEvent<string>).data) as T);
  });
}

function rearm(): void {
  window.clearTimeout(watchdog);
  watchdog = window.setTimeout(listen, patienceMilliseconds);
}
