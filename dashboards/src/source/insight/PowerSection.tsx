import { useState } from "preact/hooks";
import type { Source } from "../../api/types";
import { celsius, fixed } from "../../format/numbers";
import { unitText } from "../../format/units";
import { uncertaintyText } from "../../format/uncertainty";
import { Cards, Cell } from "../Cards";
import { seriesName } from "../drift/series";
import { Failed } from "../Failed";
import { usePolled } from "../polled";
import { readPower } from "../requests";
import { mostDays } from "./power";
import type { Power } from "./types";

const readSeconds = 600;

const verdictWord: Record<Power["verdict"], string> = {
  "too-few-days": "too few days to know",
  "no-limit": "no limit applies",
  "seen-at-once": "seen at the next check",
  "seen-within-five": "seen within 5 checks",
  "seen-within-twenty": "seen within 20 checks only",
  "cannot-be-seen": "cannot be seen",
};

/** What the monitoring would miss: the smallest drift that it finds, beside the limit. */
export function PowerSection({ source }: { source: Source }) {
  const polled = usePolled(source.id, (signal) => readPower(source.id, signal), readSeconds * 1000);
  const [isAll, setIsAll] = useState(false);
  const items = polled.value?.items ?? [];
  const shown = isAll ? items : mostDays(items);
  const blind = items.filter((item) => item.verdict === "cannot-be-seen");
  return (
    <section id="power" tabIndex={-1} class="panel" aria-labelledby="power-title">
      <h2 id="power-title">What the monitoring would miss</h2>
      {polled.failure !== null && <Failed failure={polled.failure} what="The power of the monitoring could not be read." onAgain={polled.again} />}
      {polled.value === null && polled.failure === null && <p class="quiet">Reading…</p>}
      {polled.value !== null && items.length === 0 && <p>Nothing has been decided about this source yet, so that its noise is not known.</p>}
      {blind.length > 0 && (
        <p class="abnormal">
          {blind.length === 1 ? "One limit" : `${blind.length} limits`} cannot be seen at the present noise: a shift that reaches {blind.length === 1 ? "it" : "them"} is not found reliably within 20 checks.
        </p>
      )}
      {shown.length > 0 && (
        <>
          <Cards caption="Smallest lasting shift that is found with 95 %, one check a day, 0.1 false alarms a year and criterion" heads={["Quantity", "Noise of a day", "At the next check", "Within 5", "Within 20", "Left to the limit", "A shift to the limit is"]}>
            {shown.map((item) => {
              const unit = unitText(item.unit) === "" ? "" : `\u00a0${unitText(item.unit)}`;
              const number = (value: number | null): string => (value === null ? "–" : `${uncertaintyText(value)}${unit}`);
              return (
                <tr key={`${item.criterion}${item.scope}${item.quantity}${item.setPointCelsius}`} role="row">
                  <Cell head="Quantity" isHeader>
                    {seriesName(item, source)}
                    {item.setPointCelsius !== null && ` at ${celsius(item.setPointCelsius, 0)}`}
                  </Cell>
                  <Cell head="Noise of a day" class="number">
                    {number(item.noise)} ({item.days} day{item.days === 1 ? "" : "s"}
                    {item.checksPerYear !== null && `, ${fixed(item.checksPerYear, 0)} a year`})
                  </Cell>
                  <Cell head="At the next check" class="number">{number(item.atNextCheck)}</Cell>
                  <Cell head="Within 5" class="number">{number(item.withinFive)}</Cell>
                  <Cell head="Within 20" class="number">{number(item.withinTwenty)}</Cell>
                  <Cell head="Left to the limit" class="number">{item.margin === null ? "–" : item.margin <= 0 ? "nothing" : number(item.margin)}</Cell>
                  <Cell head="A shift to the limit is" class={item.verdict === "cannot-be-seen" ? "abnormal" : ""}>
                    {verdictWord[item.verdict]}
                  </Cell>
                </tr>
              );
            })}
          </Cards>
          {items.length > shown.length || isAll ? (
            <button type="button" aria-pressed={isAll} onClick={() => setIsAll(!isAll)}>
              {isAll ? "Only the set point with most days" : `All ${items.length} set points and quantities`}
            </button>
          ) : null}
        </>
      )}
    </section>
  );
}
