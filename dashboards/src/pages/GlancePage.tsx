import { useEffect } from "preact/hooks";
import { can } from "../access/session";
import type { Alert } from "../api/types";
import { charted, ChannelChart, rangeKey, ranges } from "../chart/ChannelChart";
import { AlertList } from "../parts/AlertList";
import { HistoryBanner } from "../parts/Banners";
import { FaultPanel } from "../parts/FaultPanel";
import { HazardBoard } from "../parts/HazardBoard";
import { ReadinessStrip } from "../parts/ReadinessStrip";
import { SourcePanel } from "../parts/SourcePanel";
import { PageHead } from "../shell/PageHead";
import { goTo, listenToKeys } from "../shortcuts";
import { site, sources } from "../state";

/** All sources at a glance. */
export function GlancePage({ onAcknowledge }: { onAcknowledge: (alerts: Alert[]) => void }) {
  useEffect(() => {
    const actions: Record<string, () => void> = {
      h: () => goTo("hazards"),
      s: () => goTo("sources"),
      c: () => goTo("chart"),
      a: () => goTo("alerts"),
    };
    ranges.forEach((range, i) => (actions[String(i + 1)] = () => (rangeKey.value = range.key)));
    return listenToKeys(actions);
  }, []);
  return (
    <>
      <PageHead title="All sources" isHidden />
      <ReadinessStrip />
      <HazardBoard onAcknowledge={onAcknowledge} />
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
      <AlertList onAcknowledge={onAcknowledge} />
      {site.value?.isDemo === true && can("inject-faults") && <FaultPanel />}
    </>
  );
}
