import { useEffect, useRef } from "preact/hooks";
import { entry, me } from "../access/session";
import { standing } from "../hazards/board";
import { goTo } from "../shortcuts";
import { hazards, site } from "../state";
import { pageTitle } from "./PageHead";
import { cameByHistory, place } from "./router";

/** The window's title: standing hazards first, so that a tab in the background says so. */
export function useWindowTitle(): void {
  const open = standing(hazards.value).length;
  const parts = [open > 0 ? `(${open}) standing hazard${open === 1 ? "" : "s"}` : "", pageTitle.value, site.value?.name ?? entry.value?.siteName ?? "", "LabWatch"];
  const title = parts.filter((part) => part !== "").join(" – ");
  useEffect(() => {
    document.title = title;
  }, [title]);
}

/** After a change of the page the focus goes to its heading, or to the part that the address names. */
export function useArrival(): void {
  const { page, id } = place.value;
  const mustChoose = me.value?.mustChangePassword === true;
  const isFirst = useRef(true);
  useEffect(() => {
    if (isFirst.current) {
      isFirst.current = false;
      return;
    }
    if (location.hash.length > 1 && !cameByHistory()) {
      goTo(location.hash.slice(1));
      return;
    }
    if (!cameByHistory()) {
      window.scrollTo({ top: 0, behavior: "instant" });
    }
    // A form that starts at a field keeps that.
    if (document.querySelector("main [autofocus]:focus") === null) {
      document.getElementById("page-title")?.focus({ preventScroll: true });
    }
  }, [page, id, mustChoose]);
}
