import { effect } from "@preact/signals";
import { destination, signInAddress } from "../access/arrival";
import { access, entry } from "../access/session";
import { go, place } from "./router";

/** Strangers come to the sign-in page, or to the set-up of a new service; who is signed in has nothing to do there. */
export function guardEntrance(): void {
  effect(() => {
    const { page } = place.value;
    const isEntrance = page === "sign-in" || page === "set-up";
    const setUpNeeded = entry.value?.setUpNeeded === true;
    if (access.value === "signed-out" && setUpNeeded && page !== "set-up") {
      go("/set-up" + (page === "sign-in" ? location.hash : ""), "replace");
    } else if (access.value === "signed-out" && !isEntrance) {
      go(signInAddress(location.pathname + location.search + location.hash), "replace");
    } else if (access.value === "signed-in" && isEntrance && location.hash === "") {
      go(destination(place.value.query.get("to"), location.origin), "replace");
    }
  });
}
