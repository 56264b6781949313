import { signal } from "@preact/signals";
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
