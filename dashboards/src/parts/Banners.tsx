import { clockTime, span } from "../format/time";
import { lastHeard, link, now, progress, site } from "../state";
import { Icon } from "./Icon";

/** What must be known before anything on the page is believed. */
export function Banners() {
  return (
    <>
      {link.value === "lost" && (
        <p class="banner lost">
          <Icon name="unknown" size={22} />
          <span>
            <strong>Connection lost.</strong> Everything below is old: last heard {lastHeard.value === null ? "never" : `${span(now.value - lastHeard.value)} ago, at ${clockTime(lastHeard.value, site.value?.timeZone ?? "UTC", now.value, true)}`}.
            Trying again by itself.
          </span>
        </p>
      )}
      {progress.value !== null && (
        <div class="banner progress">
          <label for="history">{progress.value.text}</label>
          <progress id="history" max={1} value={progress.value.fraction}>
            {Math.round(progress.value.fraction * 100)} %
          </progress>
          <span class="quiet">{Math.floor(progress.value.fraction * 100)} %; the page is live meanwhile.</span>
        </div>
      )}
    </>
  );
}
