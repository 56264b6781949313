import { entry } from "../access/session";
import { clockTime, zoneName } from "../format/time";
import { link, now, site } from "../state";
import { Navigation } from "./Navigation";
import { PersonMenu } from "./PersonMenu";

/** Whose laboratory this is, whether it is heard, the pages, the person, and help. */
export function Header({ onHelp }: { onHelp: () => void }) {
  const here = site.value;
  const isDemo = here?.isDemo ?? entry.value?.isDemo ?? false;
  return (
    <header class="top">
      <div class="bar">
        <p class="site">
          <a href="/">{here?.name ?? entry.value?.siteName ?? "LabWatch"}</a>
          {isDemo && (
            <span class="tag">
              demo<span class="tag-more">, invented laboratory</span>
            </span>
          )}
        </p>
        <PersonMenu />
        <button type="button" onClick={onHelp} aria-keyshortcuts="?">
          Help
        </button>
      </div>
      <div class="bar">
        <Navigation />
        {here !== null && (
          <p class="clock">
            <span class={link.value === "live" ? "" : "abnormal"}>{link.value === "live" ? "Live" : "Not connected"}</span> ·{" "}
            <time>{clockTime(now.value, here.timeZone, now.value, true)}</time> <span class="zone quiet">({zoneName(here.timeZone, now.value)})</span>
          </p>
        )}
      </div>
    </header>
  );
}
