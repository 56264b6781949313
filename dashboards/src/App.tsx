import { useEffect, useState } from "preact/hooks";
import type { Alert } from "./api/types";
import { charted, ChannelChart, rangeKey, ranges } from "./chart/ChannelChart";
import { clockTime, zoneName } from "./format/time";
import { standing } from "./hazards/board";
import { AcknowledgeDialog } from "./parts/AcknowledgeDialog";
import { AlertList } from "./parts/AlertList";
import { HistoryBanner, LostBanner } from "./parts/Banners";
import { FaultPanel } from "./parts/FaultPanel";
import { HazardBoard } from "./parts/HazardBoard";
import { HelpDialog } from "./parts/HelpDialog";
import { ReadinessStrip } from "./parts/ReadinessStrip";
import { SourcePanel } from "./parts/SourcePanel";
import { focusAfter, goTo, listenToKeys } from "./shortcuts";
import { announcement, hazards, link, now, site, sources } from "./state";

/** All sources at a glance. */
export function App() {
  const [acknowledging, setAcknowledging] = useState<Alert[] | null>(null);
  const [helping, setHelping] = useState(false);
  useEffect(() => {
    const actions: Record<string, () => void> = {
      "?": () => setHelping(true),
      h: () => goTo("hazards"),
      s: () => goTo("sources"),
      c: () => goTo("chart"),
      a: () => goTo("alerts"),
    };
    ranges.forEach((range, i) => (actions[String(i + 1)] = () => (rangeKey.value = range.key)));
    return listenToKeys(actions);
  }, []);
  const open = standing(hazards.value).length;
  useEffect(() => {
    document.title = `${open > 0 ? `(${open}) standing hazard${open === 1 ? "" : "s"} – ` : ""}${site.value?.name ?? ""} – LabWatch`;
  }, [open, site.value?.name]);

  return (
    <>
      <a class="skip" href="#sources">
        Skip to the sources
      </a>
      <Header onHelp={() => setHelping(true)} />
      <div class="hidden" role="status" aria-live="assertive">
        {announcement.value}
      </div>
      <main class={link.value === "lost" ? "is-old" : ""}>
        <LostBanner />
        {site.value === null ? (
          <p class="panel">{link.value === "connecting" ? "Asking the service…" : "The service does not answer. Trying again by itself."}</p>
        ) : (
          <>
            <ReadinessStrip />
            <HazardBoard onAcknowledge={setAcknowledging} />
            <HistoryBanner />
            <section id="sources" aria-labelledby="sources-title" tabIndex={-1}>
              <h2 id="sources-title">Sources: may I calibrate now?</h2>
              {sources.value.length === 0 && <p class="panel">The lab file names no source yet.</p>}
              <div class="grid">
                {sources.value.map((source) => (
                  <SourcePanel
                    key={source.id}
                    source={source}
                    onShow={(chosen) => {
                      charted.value = { source: chosen.id, channel: null };
                      goTo("chart");
                    }}
                  />
                ))}
              </div>
            </section>
            <ChannelChart />
            <AlertList onAcknowledge={setAcknowledging} />
            {site.value.isDemo && <FaultPanel />}
          </>
        )}
      </main>
      <footer class="foot quiet">
        LabWatch {site.value?.version} is no protective device. <a href="/openapi/v1.json">Description of the API</a> · <a href="/health/ready">Health</a>
      </footer>
      {acknowledging !== null && (
        <AcknowledgeDialog
          chosen={acknowledging}
          onClose={() => {
            setAcknowledging(null);
            focusAfter(acknowledging);
          }}
        />
      )}
      {helping && <HelpDialog onClose={() => setHelping(false)} />}
    </>
  );
}

function Header({ onHelp }: { onHelp: () => void }) {
  const here = site.value;
  return (
    <header class="top">
      <h1>
        {here?.name ?? "LabWatch"}
        {here?.isDemo === true && <span class="tag">demo, invented laboratory</span>}
      </h1>
      <p class="clock">
        {here !== null && (
          <>
            <span class={link.value === "live" ? "" : "abnormal"}>{link.value === "live" ? "Live" : "Not connected"}</span> ·{" "}
            <time>{clockTime(now.value, here.timeZone, now.value, true)}</time> <span class="quiet">({zoneName(here.timeZone, now.value)})</span>
          </>
        )}
      </p>
      <button type="button" onClick={onHelp} aria-keyshortcuts="?">
        Help
      </button>
    </header>
  );
}
