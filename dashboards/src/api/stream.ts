import { applyAlert, applyAssessment, applyProgress, applySnapshot, applyStatus, heard, lost } from "../state";
import type { Alert, Assessment, DemoProgress, Snapshot, SourceStatus } from "./types";

// Without a word for this long the link counts as lost even where the browser still believes in it:
// the service sends its clock every five seconds where nothing else happens.
const patienceMilliseconds = 15_000;

let source: EventSource | undefined;
let watchdog: number | undefined;

/** Listens to changes for as long as the page lives, and comes back by itself after every loss. */
export function listen(): void {
  source?.close();
  source = new EventSource("/api/v1/stream");
  source.addEventListener("error", () => {
    lost();
    // A browser gives up for good after an answer that is no stream (a proxy's error page, the service starting).
    if (source?.readyState === EventSource.CLOSED) {
      window.setTimeout(listen, 3_000);
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

function on<T>(name: string, apply: (value: T) => void): void {
  source?.addEventListener(name, (event) => {
    rearm();
    apply(JSON.parse((event as MessageEvent<string>).data) as T);
  });
}

function rearm(): void {
  window.clearTimeout(watchdog);
  watchdog = window.setTimeout(() => {
    lost();
    listen();
  }, patienceMilliseconds);
}
