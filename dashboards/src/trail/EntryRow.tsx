import type { TrailEntry } from "../api/trail";
import { zonedText } from "../format/zoned";
import { typeset } from "../format/words";
import { Copy } from "../parts/Copy";
import { sources } from "../state";
import { factsOf } from "./content";
import { addressOf } from "./query";
import { actorWord, happening, subjectOf, type Subject } from "./words";

interface EntryRowProps { entry: TrailEntry; zone: string; isOpen: boolean; onToggle: (isOpen: boolean) => void }

/** One entry: who did what to what and when; opened, everything that it says. */
export function EntryRow({ entry, zone, isOpen, onToggle }: EntryRowProps) {
  const subject = subjectOf(entry, sources.value.map((source) => source.id));
  return (
    <li class="entry" id={`entry-${entry.sequence}`}>
      <details open={isOpen} onToggle={(event) => onToggle(event.currentTarget.open)}>
        <summary>
          <span class="number">{entry.sequence}</span>
          <time dateTime={entry.at}>{zonedText(entry.at, zone)}</time>
          <strong>{happening(entry)}</strong>
          <span class="who">{actorWord(entry.actor)}</span>
          <span class="quiet">{subject.text}</span>
        </summary>
        {isOpen && <Content entry={entry} zone={zone} subject={subject} />}
      </details>
    </li>
  );
}

function Content({ entry, zone, subject }: { entry: TrailEntry; zone: string; subject: Subject }) {
  return (
    <div class="content">
      <dl class="key-values">
        <Line name="Time (UTC)" value={entry.at} />
        <Line name="About" value={entry.subject} />
        {factsOf(entry.content).map(({ key, value, isInstant }) => (
          <Line key={key} name={key} value={isInstant ? zonedText(value, zone) : typeset(value)} />
        ))}
      </dl>
      <dl class="digests">
        {entry.recordDigest !== null && <Digest name="Digest of the record" text={entry.recordDigest} />}
        <Digest name="Digest of this entry" text={entry.digest} />
        {entry.sequence > 1 && <Digest name={`Digest of entry ${entry.sequence - 1}`} text={entry.previous} />}
      </dl>
      <p class="links">
        {subject.page !== null && <a href={subject.page}>Page of the source</a>}
        {subject.record !== null && <a href={subject.record}>The record itself (JSON)</a>}
        <a href={addressOf({ at: String(entry.sequence) })}>Link to this entry</a>
        <a href={addressOf({ subject: subject.whole })}>All about this</a>
        <a href={addressOf({ actor: entry.actor })}>All by {actorWord(entry.actor)}</a>
      </p>
    </div>
  );
}

function Line({ name, value }: { name: string; value: string }) {
  return (
    <div>
      <dt>{name}</dt>
      <dd>{value}</dd>
    </div>
  );
}

function Digest({ name, text }: { name: string; text: string }) {
  return (
    <div>
      <dt>{name}</dt>
      <dd>
        <Copy text={text} label={name.toLowerCase()} />
      </dd>
    </div>
  );
}
