import type { Figure } from "../../api/types";
import { significant } from "../../format/numbers";
import { unitText } from "../../format/units";
import { uncertaintyText, valueText } from "../../format/uncertainty";
import { figureWord, words } from "../../format/words";
import { plain } from "../quantity";

/** Side results with their units. */
export function Figures({ figures }: { figures: Figure[] }) {
  if (figures.length === 0) {
    return null;
  }
  return (
    <>
      <h3>Figures</h3>
      <dl class="fact-rows">
        {figures.map((figure) => (
          <div key={figure.name}>
            <dt>{figureWord[figure.name] ?? words(figure.name)}</dt>
            <dd class="number">{figureText(figure)}</dd>
          </div>
        ))}
      </dl>
    </>
  );
}

/** A figure to the place of its standard uncertainty; a count as it is; else with five significant digits at most. */
export function figureText({ name, value, standardUncertainty, unit }: Figure): string {
  const text = unitText(unit);
  const tail = text === "" ? "" : `\u00a0${text}`;
  if (value === null) {
    return "no value";
  }
  if (standardUncertainty !== null && standardUncertainty > 0) {
    return `${valueText(value, standardUncertainty, 3)}${tail} (u = ${uncertaintyText(standardUncertainty)}${tail})`;
  }
  const isPlain = Number.isInteger(value) || name.endsWith("-count");
  return `${isPlain ? plain(value) : significant(value, Math.abs(value) >= 1 && Math.abs(value) < 2000 ? 5 : 3)}${tail}`;
}
