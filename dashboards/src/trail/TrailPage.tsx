import "./trail.css";
import { useEffect, useState } from "preact/hooks";
import { listTrail, type TrailEntry, type TrailHead } from "../api/trail";
import { sentencesOf } from "../api/client";
import { whoMay } from "../access/roles";
import { can } from "../access/session";
import { zoneName } from "../format/time";
import { Problems } from "../parts/Problems";
import { PageHead } from "../shell/PageHead";
import { place } from "../shell/router";
import { now, site } from "../state";
import { ChainHead } from "./ChainHead";
import { EntryRow } from "./EntryRow";
import { addressOf, askedOf, filterOf, isFiltered, type TrailFilter } from "./query";
import { TrailFilters } from "./TrailFilters";

const entriesAtOnce = 50;

/** Everything that was done, by whom and when, newest first. */
export function TrailPage() {
  if (!can("read-trail")) {
    return (
      <>
        <PageHead title="Trail" />
        <p class="panel">Only {whoMay("read-trail")} may read the trail.</p>
      </>
    );
  }
  return <Trail filter={filterOf(place.value.query)} />;
}

function Trail({ filter }: { filter: TrailFilter }) {
  const { entries, head, hasMore, isReading, problems, readMore, readAgain } = useEntries(filter);
  const [isUtc, setUtc] = useState(false);
  const [open, setOpen] = useState<ReadonlySet<number>>(new Set());
  const zone = isUtc ? "UTC" : (site.value?.timeZone ?? "UTC");
  useEffect(() => setOpen(filter.at === "" ? new Set() : new Set([Number(filter.at)])), [filter.at]);
  const isAllOpen = entries.length > 0 && entries.every((entry) => open.has(entry.sequence));
  const toggle = (sequence: number, isOpen: boolean): void => {
    if (open.has(sequence) !== isOpen) {
      const next = new Set(open);
      (isOpen ? next.add.bind(next) : next.delete.bind(next))(sequence);
      setOpen(next);
    }
  };
  return (
    <>
      <PageHead title="Trail">
        <p class="quiet">Who did what, and when; newest first. Nothing here can be changed.</p>
      </PageHead>
      <ChainHead head={head} />
      <TrailFilters filter={filter} />
      <section class="panel" aria-labelledby="entries-title">
        <div class="entries-head">
          <h2 id="entries-title">{filter.at === "" ? "Entries" : `Entry ${filter.at} and before`}</h2>
          <p class="tools">
            <label class="inline">
              <input type="checkbox" checked={isUtc} onChange={(event) => setUtc(event.currentTarget.checked)} />
              Times in UTC
            </label>
            <button type="button" disabled={entries.length === 0} onClick={() => setOpen(isAllOpen ? new Set() : new Set(entries.map((entry) => entry.sequence)))}>
              {isAllOpen ? "Close all" : "Open all"}
            </button>
            <button type="button" disabled={isReading} onClick={readAgain}>
              Read again
            </button>
          </p>
        </div>
        <p class="quiet">Times of {zoneName(zone, now.value)}.</p>
        <Problems sentences={problems} />
        {!isReading && entries.length === 0 && problems.length === 0 && (
          <p>{isFiltered(filter) ? "No entry is like that. Take away part of the filter, or check how it is spelled." : "There is no entry yet."}</p>
        )}
        <ol class="entries">
          {entries.map((entry) => (
            <EntryRow key={entry.sequence} entry={entry} zone={zone} isOpen={open.has(entry.sequence)} onToggle={(isOpen) => toggle(entry.sequence, isOpen)} />
          ))}
        </ol>
        <p role="status">{isReading ? "Reading…" : entries.length > 0 && !hasMore ? "That is all." : ""}</p>
        {hasMore && (
          <button type="button" disabled={isReading} onClick={readMore}>
            Show older
          </button>
        )}
      </section>
    </>
  );
}

/** Reads pages of entries; a new filter starts anew. */
function useEntries(filter: TrailFilter) {
  const [entries, setEntries] = useState<TrailEntry[]>([]);
  const [head, setHead] = useState<TrailHead | null>(null);
  const [next, setNext] = useState<string | number | null>(null);
  const [problems, setProblems] = useState<string[]>([]);
  const [isReading, setReading] = useState(true);
  const key = addressOf(filter);
  const [asked, setAsked] = useState({ key, after: null as string | number | null, round: 0 });
  const after = asked.key === key ? asked.after : null;
  useEffect(() => {
    const abort = new AbortController();
    setReading(true);
    setProblems([]);
    listTrail(askedOf(filter, after, entriesAtOnce), abort.signal).then(
      (part) => {
        setEntries((before) => (after === null ? part.items : [...before, ...part.items]));
        setHead(part.head);
        setNext(part.next);
        setReading(false);
      },
      (failure: unknown) => {
        if (!abort.signal.aborted) {
          setProblems(sentencesOf(failure, "The trail could not be read."));
          setReading(false);
        }
      },
    );
    return () => abort.abort();
  }, [key, after, asked.round]);
  const read = (from: string | number | null): void => setAsked({ key, after: from, round: asked.round + 1 });
  return { entries, head, hasMore: next !== null, isReading, problems, readMore: () => read(next), readAgain: () => read(null) };
}
