import { clockTime, zoneName } from "../format/time";
import { link, now, site } from "../state";
import { Navigation } from "./Navigation";

/** Whose laboratory this is, whether it is heard, the pages, and help. */
export function Header({ onHelp }: { onHelp: () => void }) {
  const here = site.value;
  return (
    <header class="top">
      <p class="site">
        <a href="/">{here?.name ?? "LabWatch"}</a>
        {here?.isDemo === true && <span class="tag">demo, invented laboratory</span>}
      </p>
      <p class="clock">
        {here !== null && (
          <>
            <span class={link.value === "live" ? "" : "abnormal"}>{link.value === "live" ? "Live" : "Not connected"}</span> ·{" "}
            <time>{clockTime(now.value, here.timeZone, now.value, true)}</time> <span class="quiet">({zoneName(here.timeZone, now.value)})</span>
          </>
        )}
      </p>
      <Navigation />
      <button type="button" onClick={onHelp} aria-keyshortcuts="?">
        Help
      </button>
    </header>
  );
}
