import { useState } from "preact/hooks";
import type { Source } from "../../api/types";
import { celsius } from "../../format/numbers";
import { typeset } from "../../format/words";
import { site } from "../../state";
import { Failed } from "../Failed";
import { usePolled } from "../polled";
import { readForecasts } from "../requests";
import { useWidth } from "../width";
import { DriftChart } from "./DriftChart";
import { DriftFacts } from "./DriftFacts";
import { isNotable, seriesKey, seriesName } from "./series";
import type { Forecast } from "./types";

const readSeconds = 300;
const mostNotable = 6;

/** How the results move over the days, and when each would reach its limit. */
export function DriftSection({ source }: { source: Source }) {
  const polled = usePolled(source.id, (signal) => readForecasts(source.id, signal), readSeconds * 1000);
  const items = polled.value?.items ?? [];
  return (
    <section id="drift" tabIndex={-1} class="panel" aria-labelledby="drift-title">
      <h2 id="drift-title">Drift and forecast</h2>
      {polled.failure !== null && <Failed failure={polled.failure} what="The drift could not be read." onAgain={polled.again} />}
      {polled.value === null && polled.failure === null && <p class="quiet">Reading…</p>}
      {polled.value !== null && items.length === 0 && <p>Nothing has been decided about this source yet. A trend needs five days with decided assessments at one set point.</p>}
      {items.length > 0 && <Drifts source={source} items={items} />}
    </section>
  );
}

function Drifts({ source, items }: { source: Source; items: Forecast[] }) {
  const zone = site.value?.timeZone ?? "UTC";
  const [element, width] = useWidth<HTMLDivElement>();
  const [key, setKey] = useState<string | null>(null);
  const [setPoint, setSetPoint] = useState<number | null>(null);
  const notable = items.filter(isNotable);
  const keys = [...new Set(items.map(seriesKey))];
  const wanted = key ?? seriesKey(notable[0] ?? items[0]!);
  const ofKey = items.filter((item) => seriesKey(item) === (keys.includes(wanted) ? wanted : keys[0])).sort((one, other) => (one.setPointCelsius ?? 0) - (other.setPointCelsius ?? 0));
  const chosen = ofKey.find((item) => item.setPointCelsius === setPoint) ?? notable.find((item) => ofKey.includes(item)) ?? [...ofKey].sort((one, other) => other.days.length - one.days.length)[0]!;
  const choose = (item: Forecast): void => {
    setKey(seriesKey(item));
    setSetPoint(item.setPointCelsius);
  };
  return (
    <>
      {notable.length === 0 ? (
        <p>Nothing drifts to its limit by more than chance makes, and no control chart signals a lasting change.</p>
      ) : (
        <ul class="squares">
          {notable.slice(0, mostNotable).map((item) => (
            <li key={`${seriesKey(item)}@${item.setPointCelsius}`}>
              <button type="button" class="as-link" onClick={() => choose(item)}>
                {seriesName(item, source)}
                {item.setPointCelsius !== null && ` at ${celsius(item.setPointCelsius, 0)}`}
              </button>
            </li>
          ))}
          {notable.length > mostNotable && <li>and {notable.length - mostNotable} more</li>}
        </ul>
      )}
      <div class="controls">
        <label>
          Of
          <select value={seriesKey(chosen)} onChange={(event) => setKey(event.currentTarget.value)}>
            {keys.map((candidate) => (
              <option key={candidate} value={candidate}>
                {seriesName(items.find((item) => seriesKey(item) === candidate)!, source)}
              </option>
            ))}
          </select>
        </label>
        <label>
          At
          <select value={String(chosen.setPointCelsius)} onChange={(event) => setSetPoint(Number(event.currentTarget.value))}>
            {ofKey.map((item) => (
              <option key={String(item.setPointCelsius)} value={String(item.setPointCelsius)}>
                {celsius(item.setPointCelsius, 0)}, {item.days.length} day{item.days.length === 1 ? "" : "s"}
              </option>
            ))}
          </select>
        </label>
      </div>
      <div ref={element} class="drift-drawing">
        <DriftChart label={seriesName(chosen, source)} forecast={chosen} zone={zone} width={width} height={width < 500 ? 220 : 260} />
      </div>
      <p>{typeset(chosen.explanation)}</p>
      <DriftFacts forecast={chosen} zone={zone} />
    </>
  );
}
