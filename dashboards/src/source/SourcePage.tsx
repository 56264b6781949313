import { useEffect } from "preact/hooks";
import type { Alert, Source } from "../api/types";
import { rangeKey, ranges } from "../chart/ChannelChart";
import { celsius, fixed } from "../format/numbers";
import { clockTime, zoneName } from "../format/time";
import { kindWord, typeset, words } from "../format/words";
import { shortName } from "../hazards/board";
import { HistoryBanner } from "../parts/Banners";
import { listRuns } from "../runs/requests";
import { OpenRun } from "../runs/OpenRun";
import { RunSection } from "../runs/RunSection";
import type { Run } from "../runs/types";
import { PageHead } from "../shell/PageHead";
import { go, place } from "../shell/router";
import { sourceAddress } from "../shell/routes";
import { goTo, listenToKeys } from "../shortcuts";
import { assessments as allAssessments, caution, now, site, sources } from "../state";
import { Answer } from "./answer/Answer";
import { BandAnswers } from "./answer/BandAnswers";
import { SourceAlerts } from "./answer/SourceAlerts";
import { assessmentAddress } from "./assessment/address";
import { AssessmentDialog } from "./assessment/AssessmentDialog";
import { ChannelSection } from "./ChannelSection";
import { assessmentsOf } from "./criteria";
import { DriftSection } from "./drift/DriftSection";
import { Guarded } from "./Guarded";
import { HistorySection } from "./history/HistorySection";
import { AttributionSection } from "./insight/AttributionSection";
import { BudgetSection } from "./insight/BudgetSection";
import { PowerSection } from "./insight/PowerSection";
import { usePolled } from "./polled";
import { ProfileSection } from "./profile/ProfileSection";
import { RadianceSection } from "./radiance/RadianceSection";
import { InstrumentSection } from "./records/InstrumentSection";
import { LimitSection } from "./records/LimitSection";
import { readDetail, readProfile } from "./requests";
import "./source.css";

interface SourcePageProps { id: string; onAcknowledge: (alerts: Alert[]) => void }

/** One source: may it be calibrated with now, what its cavity does, how its criteria went, and on what all that rests. */
export function SourcePage({ id, onAcknowledge }: SourcePageProps) {
  const source = sources.value.find((candidate) => candidate.id === id);
  return source === undefined ? (
    <>
      <PageHead title="There is no such source" />
      <p class="panel">
        The lab file in force names no source <code>{id}</code>. <a href="/">All sources</a>
      </p>
    </>
  ) : (
    <Known source={source} onAcknowledge={onAcknowledge} />
  );
}

const sections: [id: string, name: string][] = [
  ["answer", "Now"],
  ["cavity", "Cavity"],
  ["radiance", "Radiance"],
  ["history", "Criteria"],
  ["drift", "Drift"],
  ["causes", "Causes"],
  ["budget", "Budget"],
  ["power", "Power"],
  ["chart", "Channels"],
  ["runs", "Runs"],
  ["instruments", "Instruments"],
  ["limits", "Limits"],
];

const readSeconds = { profile: 10, detail: 60, runs: 30 };

function Known({ source, onAcknowledge }: { source: Source; onAcknowledge: (alerts: Alert[]) => void }) {
  const profile = usePolled(source.id, (signal) => readProfile(source.id, signal), readSeconds.profile * 1000);
  const detail = usePolled(source.id, (signal) => readDetail(source.id, signal), readSeconds.detail * 1000);
  const runs = usePolled(source.id, (signal) => listRuns(source.id, null, signal), readSeconds.runs * 1000);
  const assessments = assessmentsOf(allAssessments.value, source.id);
  const shown = place.value.query.get("assessment");
  const open = (assessment: string): void => go(assessmentAddress(source.id, assessment), shown === null ? "push" : "replace");
  useKeys();
  const run = openRunOf(source, runs.value?.items ?? []);
  return (
    <>
      <PageHead title={shortName(source.name)}>
        <p class="quiet">
          {typeset(source.name)} · {kindWord[source.kind] ?? words(source.kind)}, {fixed(source.minimumCelsius, 0)} to {celsius(source.maximumCelsius, 0)}, {source.route === "contact" ? "traceable by contact thermometer" : "traceable by radiation thermometer"}
          {source.purgeGas !== null && `, purged with ${source.purgeGas}`}
        </p>
        <p class="print-only">
          {site.value?.name}, source {source.id}. Printed from the service's clock at {clockTime(now.value, site.value?.timeZone ?? "UTC", 0, true)} ({zoneName(site.value?.timeZone ?? "UTC", now.value)}), LabWatch {site.value?.version}.
        </p>
      </PageHead>
      <nav class="within" aria-label="On this page">
        <ul>
          {sections.map(([section, name]) => (
            <li key={section}>
              <a href={`#${section}`}>{name}</a>
            </li>
          ))}
        </ul>
      </nav>
      <HistoryBanner />
      <Answer source={source} />
      <SourceAlerts source={source} onAcknowledge={onAcknowledge} />
      <div class="pair">
        <OpenRun source={source} run={run} onChanged={runs.again} />
        <section id="decisions" tabIndex={-1} class="panel" aria-labelledby="decisions-title">
          <h2 id="decisions-title">Newest decisions</h2>
          <BandAnswers source={source} assessments={assessments} onOpen={open} />
        </section>
      </div>
      <Guarded name="Cavity and axial profile">
        <ProfileSection source={source} polled={profile} />
      </Guarded>
      <Guarded name="Radiance by working band">
        <RadianceSection source={source} polled={profile} assessments={assessments} onOpen={open} />
      </Guarded>
      <Guarded name="Criteria over time">
        <HistorySection source={source} assessments={assessments} limits={detail.value?.limits ?? []} onOpen={open} />
      </Guarded>
      <Guarded name="Drift and forecast">
        <DriftSection source={source} />
      </Guarded>
      <Guarded name="What lies behind a deviation">
        <AttributionSection source={source} />
      </Guarded>
      <Guarded name="Uncertainty budget, live">
        <BudgetSection source={source} onOpen={open} />
      </Guarded>
      <Guarded name="What the monitoring would miss">
        <PowerSection source={source} />
      </Guarded>
      <Guarded name="Channels over time">
        <ChannelSection source={source} />
      </Guarded>
      <Guarded name="Calibration runs">
        <RunSection source={source} polled={runs} />
      </Guarded>
      <Guarded name="Instruments and certificates">
        <InstrumentSection source={source} instruments={detail.value?.instruments ?? null} />
      </Guarded>
      <Guarded name="Acceptance limits in force">
        <LimitSection source={source} limits={detail.value?.limits ?? null} onRevised={detail.again} />
      </Guarded>
      <p class="caution print-only">{caution.value}</p>
      {shown !== null && <AssessmentDialog source={source} id={shown} onOpen={open} onClose={() => go(sourceAddress(source.id), "replace")} />}
    </>
  );
}

/** The open run: as the stream tells it, else as the list had it. */
function openRunOf(source: Source, listed: Run[]): Run | null {
  const { run } = source.status;
  return run === undefined ? (listed.find((candidate) => candidate.endedAt === null && !candidate.cancelled) ?? null) : run;
}

function useKeys(): void {
  useEffect(() => {
    const actions: Record<string, () => void> = { h: () => goTo("hazards"), c: () => goTo("chart"), r: () => goTo("runs") };
    ranges.forEach((range, i) => (actions[String(i + 1)] = () => (rangeKey.value = range.key)));
    return listenToKeys(actions);
  }, []);
}
