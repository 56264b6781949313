import type { ComponentChildren } from "preact";
import { useState } from "preact/hooks";
import type { Source } from "../../api/types";
import { celsius, fixed } from "../../format/numbers";
import { clockTime } from "../../format/time";
import { coverageText, uncertaintyText } from "../../format/uncertainty";
import { typeset, words } from "../../format/words";
import { now, site } from "../../state";
import { Cards, Cell } from "../Cards";
import { bandName } from "../criteria";
import { Failed } from "../Failed";
import { usePolled } from "../polled";
import { readBudgets } from "../requests";
import type { Budget } from "./types";

const readSeconds = 300;
const milli = (value: number | null): string => (value === null ? "–" : `${uncertaintyText(value)}\u00a0mK`);

/** The live uncertainty budget beside the CMC, for a band and set point. */
export function BudgetSection({ source, onOpen }: { source: Source; onOpen: (id: string) => void }) {
  const polled = usePolled(source.id, (signal) => readBudgets(source.id, signal), readSeconds * 1000);
  const items = polled.value?.items ?? [];
  const [key, setKey] = useState<string | null>(null);
  const keyOf = (budget: Budget): string => `${budget.band}@${budget.setPointCelsius}`;
  const newest = [...items].sort((one, other) => other.windowEnd.localeCompare(one.windowEnd))[0];
  const chosen = items.find((budget) => keyOf(budget) === key) ?? newest;
  const broken = items.filter((budget) => budget.cmcHolds === false);
  const named = (budget: Budget): string => `${bandName(source.bands.find((band) => band.id === budget.band) ?? { name: budget.band })}, ${celsius(budget.setPointCelsius, 0)}`;
  return (
    <section id="budget" tabIndex={-1} class="panel" aria-labelledby="budget-title">
      <h2 id="budget-title">Uncertainty budget, live</h2>
      {polled.failure !== null && <Failed failure={polled.failure} what="The budgets could not be read." onAgain={polled.again} />}
      {polled.value === null && polled.failure === null && <p class="quiet">Reading…</p>}
      {polled.value !== null && chosen === undefined && <p>No budget has been decided on yet: it needs a CMC (a limit of the criterion “budget”) and a settled source.</p>}
      {broken.length > 0 && <p class="abnormal">The CMC does not hold: {broken.map(named).join("; ")}.</p>}
      {chosen !== undefined && (
        <>
          <div class="controls">
            <label>
              Band and set point
              <select value={keyOf(chosen)} onChange={(event) => setKey(event.currentTarget.value)}>
                {items.map((budget) => (
                  <option key={keyOf(budget)} value={keyOf(budget)}>
                    {named(budget)}
                  </option>
                ))}
              </select>
            </label>
          </div>
          <BudgetTable budget={chosen} name={named(chosen)} onOpen={onOpen} />
        </>
      )}
    </section>
  );
}

function BudgetTable({ budget, name, onOpen }: { budget: Budget; name: string; onOpen: (id: string) => void }) {
  const check = budget.monteCarlo;
  return (
    <>
      <dl class="fact-rows">
        <Row term="Live expanded uncertainty">
          U{"\u00a0=\u00a0"}
          {milli(budget.expandedMillikelvin)}, k{"\u00a0=\u00a0"}
          {coverageText(budget.coverageFactor)}, {budget.degreesOfFreedom === null || budget.degreesOfFreedom > 1000 ? "more than 1000 effective degrees of freedom" : `${fixed(budget.degreesOfFreedom, 0)} effective degrees of freedom`}
        </Row>
        <Row term="CMC">{budget.cmcMillikelvin === null ? "none on record" : `${milli(budget.cmcMillikelvin)}: ${budget.cmcHolds === true ? "holds" : "does not hold"}`}</Row>
        <Row term="Report at least">{milli(budget.reportableMillikelvin)} (never below the CMC)</Row>
        {check !== null && (
          <Row term="Check by Monte Carlo (JCGM 101)">
            u{"\u00a0=\u00a0"}
            {milli(check.standardUncertaintyMillikelvin)} from {fixed(check.trials, 0)} trials: {check.agrees ? "agrees" : "does not agree, the budget is not linear; use the interval of the trials"}
          </Row>
        )}
        <Row term="Window">
          ended {clockTime(budget.windowEnd, site.value?.timeZone ?? "UTC", now.value)}{" "}
          <button type="button" class="as-link" onClick={() => onOpen(budget.assessment)}>
            Show<span class="hidden"> the assessment of the budget</span>
          </button>
        </Row>
      </dl>
      <Cards caption={`Contributions, ${name}`} heads={["Contribution", "u", "How", "Claimed", "Share of the variance"]}>
        {budget.lines.map((line) => (
          <tr key={line.name} role="row">
            <Cell head="Contribution" isHeader>
              {words(line.name)}
            </Cell>
            <Cell head="u" class="number">
              {milli(line.standardUncertaintyMillikelvin)}
            </Cell>
            <Cell head="How">{line.isMeasured ? "measured or stated" : "claimed"}</Cell>
            <Cell head="Claimed" class="number">
              {line.claimedMillikelvin === null ? "–" : milli(line.claimedMillikelvin)}
              {line.isMeasured && line.claimedMillikelvin !== null && line.standardUncertaintyMillikelvin > line.claimedMillikelvin && <span class="abnormal"> exceeded</span>}
            </Cell>
            <Cell head="Share of the variance" class="number">
              {fixed(100 * line.share, line.share < 0.01 ? 1 : 0)}
              {"\u00a0%"}
            </Cell>
          </tr>
        ))}
      </Cards>
      <p class="quiet">{typeset(budget.explanation)}</p>
    </>
  );
}

function Row({ term, children }: { term: string; children: ComponentChildren }) {
  return (
    <div>
      <dt>{term}</dt>
      <dd class="number">{children}</dd>
    </div>
  );
}
