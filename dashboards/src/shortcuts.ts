import { signal } from "@preact/signals";
import type { Alert } from "./api/types";
import { recall } from "./memory";

/** Whether single keys work: WCAG 2.2, 2.1.4 wants them to be turned off where they get in the way. */
export const usesShortcuts = signal(recall("shortcuts") !== "off");

/** Listens to single keys outside of fields and dialogs. */
export function listenToKeys(actions: Record<string, () => void>): () => void {
  const onKey = (event: KeyboardEvent): void => {
    const target = event.target as HTMLElement;
    const isTyping = target.closest("input, select, textarea, dialog, [contenteditable]") !== null;
    const action = actions[event.key.toLowerCase()];
    if (usesShortcuts.value && !isTyping && !event.ctrlKey && !event.metaKey && !event.altKey && action !== undefined) {
      event.preventDefault();
      action();
    }
  };
  window.addEventListener("keydown", onKey);
  return () => window.removeEventListener("keydown", onKey);
}

/** Scrolls to a section and gives it the focus, so that the next Tab goes on from there. */
export function goTo(id: string): void {
  const section = document.getElementById(id);
  section?.scrollIntoView({ block: "start" });
  section?.focus({ preventScroll: true });
}

/** The focus after an acknowledgement whose button went with it: the alert where it still stands, else the next that waits, else its section. */
export function focusAfter(acknowledged: Alert[]): void {
  requestAnimationFrame(() => {
    const [alert] = acknowledged;
    if (alert === undefined || document.activeElement !== document.body) {
      return;
    }
    const places = alert.isHazard ? [`#alert-${alert.id}`, "#gone details[open] li button", "#gone summary", "#hazards"] : [`#alert-${alert.id}`, "#alerts"];
    places.map((place) => document.querySelector<HTMLElement>(place)).find((element) => element !== null)?.focus();
  });
}
