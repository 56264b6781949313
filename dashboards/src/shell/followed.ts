import { useEffect } from "preact/hooks";
import { access, can } from "../access/session";
import { sentencesOf } from "../api/client";
import { followLink } from "../api/devices";
import type { Alert } from "../api/types";
import { goTo } from "../shortcuts";
import { alerts, announcement, site } from "../state";
import { go, place } from "./router";
import { patterns } from "./routes";

/** Who comes by a link of a message is led to its alert, once signed in; the link itself shows nothing and ends after a while. */
export function useFollowedLink(onAcknowledge: (alerts: Alert[]) => void): void {
  const token = place.value.page === "glance" ? place.value.query.get("acknowledge") : null;
  const isReady = token !== null && access.value === "signed-in" && site.value !== null;
  useEffect(() => {
    if (!isReady) {
      return;
    }
    void (async () => {
      try {
        const { alert: id } = await followLink(token);
        go(patterns.glance, "replace");
        const found = alerts.value.find((alert) => alert.id === id);
        if (found === undefined) {
          announcement.value = "The alert of the link is over.";
          goTo("alerts");
        } else if (found.acknowledgedAt === null && can("acknowledge")) {
          onAcknowledge([found]);
        } else {
          goTo(`alert-${id}`);
        }
      } catch (failure) {
        go(patterns.glance, "replace");
        announcement.value = sentencesOf(failure, "The link could not be followed.").join(" ");
        goTo("alerts");
      }
    })();
  }, [isReady, token]);
}
