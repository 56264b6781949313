import { useState } from "preact/hooks";
import { can } from "../../access/session";
import type { Source } from "../../api/types";
import { celsius } from "../../format/numbers";
import { clockTime } from "../../format/time";
import { typeset, words } from "../../format/words";
import { now, site } from "../../state";
import { Cards, Cell } from "../Cards";
import { bandName, byOrder, criterionName } from "../criteria";
import { usePolled } from "../polled";
import { limitText } from "../quantity";
import type { Limit } from "../types";
import { listLimits, type LimitEntry, type LimitRevision } from "./limits";
import { ReviseLimitDialog } from "./ReviseLimitDialog";

const heads = ["Criterion", "At most", "Applies to", "In force since", "Revision"] as const;

interface LimitSectionProps { source: Source; limits: Limit[] | null; onRevised: () => void }

/** The acceptance limits in force, with who set them, when and why. */
export function LimitSection({ source, limits, onRevised }: LimitSectionProps) {
  const [revising, setRevising] = useState<LimitEntry | null>(null);
  const history = usePolled(source.id, (signal) => listLimits(source.id, signal), 300_000);
  const revisions = history.value ?? [];
  const mayRevise = can("revise-records");
  return (
    <section id="limits" tabIndex={-1} class="panel" aria-labelledby="limits-title">
      <h2 id="limits-title">Acceptance limits in force</h2>
      {limits === null ? (
        <p class="quiet">Reading…</p>
      ) : limits.length === 0 ? (
        <p>No limit is in force for this source: its criteria are computed and not decided.</p>
      ) : (
        <Cards caption="Limits in force now" heads={mayRevise ? [...heads, "Change"] : [...heads]} isCaptionHidden>
          {[...limits]
            .sort((one, other) => byOrder(one.criterion, other.criterion) || (one.minimumCelsius ?? -274) - (other.minimumCelsius ?? -274) || one.id.localeCompare(other.id))
            .map((limit) => (
              <LimitRow key={limit.id} source={source} limit={limit} revisions={revisions.filter((revision) => revision.id === idOf(limit.id))} onRevise={mayRevise ? setRevising : null} />
            ))}
        </Cards>
      )}
      {revising !== null && (
        <ReviseLimitDialog
          limit={revising}
          revisions={revisions}
          onClose={() => setRevising(null)}
          onDone={() => {
            setRevising(null);
            history.again();
            onRevised();
          }}
        />
      )}
    </section>
  );
}

/** The id of a record without its revision. */
const idOf = (record: string): string => record.replace(/@\d+$/, "");

interface LimitRowProps { source: Source; limit: Limit; revisions: LimitRevision[]; onRevise: ((limit: LimitEntry) => void) | null }

function LimitRow({ source, limit, revisions, onRevise }: LimitRowProps) {
  const zone = site.value?.timeZone ?? "UTC";
  const time = (instant: string): string => clockTime(instant, zone, now.value);
  const mine = revisions.find((revision) => revision.reference === limit.id);
  const others = revisions.filter((revision) => revision !== mine);
  const band = source.bands.find((candidate) => candidate.id === limit.band);
  return (
    <tr role="row">
      <Cell head={heads[0]} isHeader>
        {criterionName(limit.criterion)}
        {limit.band !== null && `, ${band === undefined ? limit.band : bandName(band)}`}
      </Cell>
      <Cell head={heads[1]} class="number">
        {limitText(limit.maximum, limit.unit)} <span class="quiet">{words(limit.rule).toLowerCase()}</span>
      </Cell>
      <Cell head={heads[2]} class="number">
        {rangeText(limit)}
      </Cell>
      <Cell head={heads[3]} class="number">
        {time(limit.effectiveFrom)}
      </Cell>
      <Cell head={heads[4]}>
        {limit.id}
        {mine !== undefined && (
          <p class="quiet">
            by {mine.author}: {typeset(mine.reason)}
          </p>
        )}
        {others.length > 0 && (
          <details>
            <summary>Other revisions ({others.length})</summary>
            <ul class="squares">
              {others.map((revision) => (
                <li key={revision.reference}>
                  {revision.reference}: {revision.content === null ? "taken out of force" : `at most ${limitText(revision.content.maximum, revision.content.unit)}`} from {time(revision.effectiveFrom)}, by {revision.author}: {typeset(revision.reason)}
                </li>
              ))}
            </ul>
          </details>
        )}
      </Cell>
      {onRevise !== null && (
        <Cell head="Change">
          {mine?.content != null && (
            <button type="button" onClick={() => onRevise(mine.content!)}>
              Revise<span class="hidden"> the limit of {criterionName(limit.criterion)}</span>
            </button>
          )}
        </Cell>
      )}
    </tr>
  );
}

function rangeText(limit: Limit): string {
  const { minimumCelsius: low, maximumCelsius: high } = limit;
  return low === null && high === null ? "every set point" : high === null ? `${celsius(low, 0)} and above` : low === null ? `up to ${celsius(high, 0)}` : `${celsius(low, 0)} to ${celsius(high, 0)}`;
}
