import { signal } from "@preact/signals";
import { placeOf, type Place } from "./routes";

/** Where the person is. */
export const place = signal<Place>(placeOf(new URL(location.href)));

let isStep = false;

/** Whether the person came here by the back or forward button: the browser then knows where on the page they were. */
export const cameByHistory = (): boolean => isStep;

/** Goes to an address of these pages; "replace" leaves no step for the back button. */
export function go(address: string, how: "push" | "replace" = "push"): void {
  const target = new URL(address, location.href);
  if (how === "replace") {
    history.replaceState(null, "", target);
  } else if (target.href !== location.href) {
    history.pushState(null, "", target);
  }
  isStep = false;
  place.value = placeOf(target);
}

/** Makes links between these pages change the page without a reload; everything else stays with the browser. */
export function listenToLinks(): void {
  window.addEventListener("popstate", () => {
    const target = placeOf(new URL(location.href));
    // A step inside a page (#hazards) is the browser's.
    if (target.path !== place.value.path || target.query.toString() !== place.value.query.toString()) {
      isStep = true;
      place.value = target;
    }
  });
  document.addEventListener("click", (event) => {
    const link = (event.target as Element).closest<HTMLAnchorElement>("a[href]");
    const isPlain = event.button === 0 && !event.metaKey && !event.ctrlKey && !event.shiftKey && !event.altKey;
    if (event.defaultPrevented || !isPlain || link === null || link.target !== "" || link.hasAttribute("download") || link.origin !== location.origin) {
      return;
    }
    const isInside = link.pathname === location.pathname && link.search === location.search && link.hash !== "";
    if (!isInside && placeOf(new URL(link.href)).page !== "unknown") {
      event.preventDefault();
      go(link.href);
    }
  });
}
