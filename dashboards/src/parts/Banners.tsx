import { access } from "../access/session";
import { clockTime, span } from "../format/time";
import { lastHeard, link, now, progress, site } from "../state";
import { Icon } from "./Icon";

/** What must be known before anything on the page is believed. */
export function LostBanner() {
  if (link.value !== "lost") {
    return null;
  }
  const isOver = access.value === "ended";
  const heard = lastHeard.value;
  const when = heard === null ? "never" : `${span(now.value - heard)} ago, at ${clockTime(heard, site.value?.timeZone ?? "UTC", now.value, true)}`;
  return (
    <p class="banner lost">
      <Icon name="unknown" size={22} />
      <span>
        <strong>{isOver ? "Session ended." : "Connection lost."}</strong> Everything below is old: last heard {when}. {isOver ? "Sign in to go on." : "Trying again by itself."}
      </span>
    </p>
  );
}

/** How far the demo's history is. */
export function HistoryBanner() {
  const filling = progress.value;
  return filling === null ? null : (
    <div class="banner progress">
      <label for="history">{filling.text}</label>
      <progress id="history" max={1} value={filling.fraction}>
        {Math.round(filling.fraction * 100)} %
      </progress>
      <span class="quiet">{Math.floor(filling.fraction * 100)} %; the page is live meanwhile.</span>
    </div>
  );
}
