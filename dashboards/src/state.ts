import { computed, signal } from "@preact/signals";
import type { Alert, Assessment, DemoProgress, Site, Snapshot, Source, SourceStatus } from "./api/types";
import { typeset } from "./format/words";

/** Whether the service is heard: connecting (nothing seen yet), live, or lost. */
export const link = signal<"connecting" | "live" | "lost">("connecting");
export const site = signal<Site | null>(null);
export const sources = signal<Source[]>([]);
export const alerts = signal<Alert[]>([]);
export const assessments = signal<Assessment[]>([]);
export const progress = signal<DemoProgress | null>(null);
export const caution = signal("");

/** What a screen reader is told at once: new hazards, and a lost or regained link. */
export const announcement = signal("");

/** Time of the service's clock, carried on by this machine's monotonic clock between two events. */
export const now = signal(Date.now());
let serviceTime = Date.now();
let heardAt = performance.now();

/** Service's time of the last thing heard; null before the first. */
export const lastHeard = signal<number | null>(null);

export const hazards = computed(() => alerts.value.filter((alert) => alert.isHazard));
export const deviations = computed(() => alerts.value.filter((alert) => !alert.isHazard));

export function tick(): void {
  now.value = serviceTime + (performance.now() - heardAt);
}

export function heard(serviceNow: string): void {
  serviceTime = Date.parse(serviceNow);
  heardAt = performance.now();
  lastHeard.value = serviceTime;
  if (link.value === "lost") {
    announcement.value = "The service answers again.";
  }
  link.value = "live";
  tick();
}

export function lost(): void {
  if (link.value === "live") {
    link.value = "lost";
    announcement.value = "The connection to the service is lost. Values shown are old.";
  }
}

/** Forgets everything that was shown, so that nothing of it stays for the next person. */
export function forget(): void {
  site.value = null;
  sources.value = [];
  alerts.value = [];
  assessments.value = [];
  progress.value = null;
  lastHeard.value = null;
  announcement.value = "";
  link.value = "connecting";
}

export function applySnapshot(snapshot: Snapshot): void {
  const known = new Set(alerts.value.map((alert) => alert.id));
  const isFirst = site.value === null;
  site.value = snapshot.site;
  sources.value = snapshot.sources;
  alerts.value = snapshot.openAlerts;
  assessments.value = snapshot.assessments;
  progress.value = snapshot.demoProgress;
  caution.value = snapshot.caution;
  heard(snapshot.site.now);
  const fresh = snapshot.openAlerts.filter((alert) => alert.isHazard && !known.has(alert.id));
  if (fresh.length > 0) {
    announcement.value = isFirst ? `${fresh.length} open hazard${fresh.length === 1 ? "" : "s"}. ${typeset(fresh[0]!.headline)}` : fresh.map((alert) => typeset(alert.headline)).join(" ");
  }
}

export function applyStatus(serviceNow: string, status: SourceStatus): void {
  heard(serviceNow);
  sources.value = sources.value.map((source) => (source.id === status.id ? { ...source, status } : source));
}

export function applyAlert(alert: Alert): void {
  const before = alerts.value.find((candidate) => candidate.id === alert.id);
  const others = alerts.value.filter((candidate) => candidate.id !== alert.id);
  alerts.value = alert.state === "normal" ? others : [alert, ...others].sort(byUrgency);
  if (alert.isHazard && alert.state === "raised-unacknowledged" && before?.state !== "raised-unacknowledged") {
    announcement.value = `New hazard. ${typeset(alert.headline)}`;
  }
}

export function applyAssessment(assessment: Assessment): void {
  const others = assessments.value.filter(
    (other) => !(other.source === assessment.source && other.criterion === assessment.criterion && other.scope === assessment.scope),
  );
  assessments.value = [...others, assessment];
}

export function applyProgress(next: DemoProgress): void {
  progress.value = next.fraction >= 1 ? null : next;
}

const urgency = { high: 2, medium: 1, low: 0 } as const;

/** Hazards first, then what nobody has acknowledged, then by priority, newest first: the order of the service. */
export function byUrgency(one: Alert, other: Alert): number {
  return (
    Number(other.isHazard) - Number(one.isHazard) ||
    Number(other.acknowledgedAt === null) - Number(one.acknowledgedAt === null) ||
    urgency[other.priority] - urgency[one.priority] ||
    Date.parse(other.raisedAt) - Date.parse(one.raisedAt)
  );
}
