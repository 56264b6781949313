import { useEffect, useRef, useState } from "preact/hooks";
import type { Assessment, Source } from "../../api/types";
import { rangeKey, ranges } from "../../chart/ChannelChart";
import { day, zoneName } from "../../format/time";
import { now, site } from "../../state";
import { byOrder, criterionMeaning, criterionName, scopeName } from "../criteria";
import { Failed } from "../Failed";
import { usePolled } from "../polled";
import { readHistory } from "../requests";
import type { Limit } from "../types";
import { useWidth } from "../width";
import { download, historyCsv } from "./csv";
import { HistoryChart } from "./HistoryChart";
import { HistoryKey } from "./HistoryKey";
import { HistoryTable } from "./HistoryTable";
import { pointsOf, scopesOf } from "./points";

interface HistorySectionProps { source: Source; assessments: Assessment[]; limits: Limit[]; onOpen: (id: string) => void }

/** How each criterion went: value, uncertainty, limit and decision over time. */
export function HistorySection({ source, assessments, limits, onOpen }: HistorySectionProps) {
  const criteria = [...new Set([...assessments.map((assessment) => assessment.criterion), ...limits.map((limit) => limit.criterion)])].sort(byOrder);
  const [chosen, setChosen] = useState<string | null>(null);
  const criterion = criteria.includes(chosen ?? "") ? chosen! : criteria[0];
  return (
    <section id="history" tabIndex={-1} class="panel chart" aria-labelledby="history-title">
      <h2 id="history-title">Criteria over time</h2>
      {criterion === undefined ? (
        <p>Nothing has been assessed yet, and no limit is in force for this source.</p>
      ) : (
        <History source={source} criterion={criterion} criteria={criteria} latest={assessments.filter((assessment) => assessment.criterion === criterion)} onCriterion={setChosen} onOpen={onOpen} />
      )}
    </section>
  );
}

interface HistoryProps { source: Source; criterion: string; criteria: string[]; latest: Assessment[]; onCriterion: (criterion: string) => void; onOpen: (id: string) => void }

function History({ source, criterion, criteria, latest, onCriterion, onOpen }: HistoryProps) {
  const range = ranges.find((candidate) => candidate.key === rangeKey.value)!;
  const [scope, setScope] = useState<string | null>(null);
  const [element, width] = useWidth<HTMLDivElement>();
  const zone = site.value?.timeZone ?? "UTC";
  const polled = usePolled(
    `${source.id}/${criterion}/${range.key}`,
    async (signal) => {
      const to = Math.ceil(now.value / 1000);
      const items = await readHistory(source.id, criterion, new Date((to - range.seconds) * 1000), new Date(to * 1000), signal);
      return { items, from: to - range.seconds, to };
    },
    120_000,
  );
  // A new assessment comes over the stream: read at once, not at the next round.
  const newest = latest.map((assessment) => assessment.id).join();
  const before = useRef(newest);
  useEffect(() => {
    if (before.current !== newest) {
      before.current = newest;
      polled.again();
    }
  }, [newest]);
  const held = polled.value;
  const scopes = scopesOf([...(held?.items ?? []), ...latest]);
  const current = scope !== null && scopes.includes(scope) ? scope : (scopes[0] ?? "");
  const points = pointsOf(held?.items ?? [], current);
  const named = (candidate: string): string => scopeName(candidate, source) || "whole source";
  return (
    <>
      <div class="controls">
        <label>
          Criterion
          <select value={criterion} onChange={(event) => onCriterion(event.currentTarget.value)}>
            {criteria.map((code) => (
              <option key={code} value={code}>
                {criterionName(code)}
              </option>
            ))}
          </select>
        </label>
        {scopes.length > 1 && (
          <label>
            Of
            <select value={current} onChange={(event) => setScope(event.currentTarget.value)}>
              {scopes.map((candidate) => (
                <option key={candidate} value={candidate}>
                  {named(candidate)}
                </option>
              ))}
            </select>
          </label>
        )}
        <RangeButtons />
      </div>
      <p class="print-only">
        {criterionName(criterion)}, {named(current)}, {range.label}
      </p>
      <div ref={element} class="history-drawing">
        {polled.failure !== null && <Failed failure={polled.failure} what="The assessments could not be read." onAgain={polled.again} />}
        {held === null && polled.failure === null && <p class="quiet">Reading…</p>}
        {held !== null && points.length === 0 && <p>No assessment of it ended in this stretch of time.</p>}
        {held !== null && points.length > 0 && (
          <HistoryChart label={`${criterionName(criterion)} of ${source.name}`} points={points} from={held.from} to={held.to} zone={zone} width={width} height={width < 500 ? 250 : 300} onOpen={onOpen} />
        )}
      </div>
      {points.length > 0 && (
        <>
          <HistoryKey points={points} />
          <p class="quiet chart-note">
            {criterionMeaning(criterion)} Each point is one window, at its end. Times in {zoneName(zone, now.value)}.{" "}
            <button type="button" class="as-link" onClick={() => download(fileName(source, criterion, current), historyCsv(points.map((point) => point.assessment)))}>
              Download what is shown as CSV
            </button>
          </p>
          <HistoryTable points={points} zone={zone} onOpen={onOpen} />
        </>
      )}
    </>
  );
}

export function RangeButtons() {
  return (
    <div class="ranges" role="group" aria-label="Stretch of time">
      {ranges.map((candidate) => (
        <button key={candidate.key} type="button" aria-pressed={candidate.key === rangeKey.value} onClick={() => (rangeKey.value = candidate.key)}>
          {candidate.label}
        </button>
      ))}
    </div>
  );
}

const fileName = (source: Source, criterion: string, scope: string): string =>
  `${[source.id, criterion, scope].filter((part) => part !== "").join("_").replaceAll(/[^A-Za-z0-9._-]+/g, "-")}_${day(new Date(now.value), "UTC")}.csv`;
