import type { Readiness, Reason, Source } from "../../api/types";
import { typeset } from "../../format/words";
import { Icon } from "../../parts/Icon";
import { now, site } from "../../state";
import { forecastText } from "./forecast";

/** What is missing for ready, each a sentence; then what else is to be known. */
export function Reasons({ source, readiness }: { source: Source; readiness: Readiness }) {
  const blocking = readiness.reasons.filter((reason) => reason.blocks);
  const others = readiness.reasons.filter((reason) => !reason.blocks);
  const expected = forecastText(readiness.expected, site.value?.timeZone ?? "UTC", now.value);
  return (
    <div class="reasons">
      <Blocking title="Missing for ready" source={source} reasons={blocking.filter((reason) => !reason.passesByWaiting)} />
      <Blocking title="Missing for ready, cured by waiting" source={source} reasons={blocking.filter((reason) => reason.passesByWaiting)} />
      {expected !== null && (
        <p>
          <strong>{expected}</strong> <span class="quiet">An estimate for planning, from how it behaves now.</span>
        </p>
      )}
      {others.length > 0 &&
        (blocking.length === 0 ? (
          <>
            <h3>In order</h3>
            <Others source={source} reasons={others} />
          </>
        ) : (
          <details>
            <summary>What else is known ({others.length})</summary>
            <Others source={source} reasons={others} />
          </details>
        ))}
    </div>
  );
}

function Blocking({ title, source, reasons }: { title: string; source: Source; reasons: Reason[] }) {
  return reasons.length === 0 ? null : (
    <>
      <h3>{title}</h3>
      <ul class="blocking">
        {reasons.map((reason) => (
          <li key={reason.code + reason.text}>
            <Icon name="deviation" size={17} />
            <span>{sentence(source, reason)}</span>
          </li>
        ))}
      </ul>
    </>
  );
}

const Others = ({ source, reasons }: { source: Source; reasons: Reason[] }) => (
  <ul class="squares quiet">
    {reasons.map((reason) => (
      <li key={reason.code + reason.text}>{sentence(source, reason)}</li>
    ))}
  </ul>
);

/** A reason without the source's name, which stands above it. */
const sentence = (source: Source, reason: Reason): string => typeset(reason.text.startsWith(`${source.name}, `) ? reason.text.slice(source.name.length + 2) : reason.text);
