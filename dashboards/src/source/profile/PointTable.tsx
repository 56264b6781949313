import type { Source } from "../../api/types";
import { celsius, fixed } from "../../format/numbers";
import { celsiusText, coverageText, differenceText, uncertaintyKelvin } from "../../format/uncertainty";
import { typeset } from "../../format/words";
import { Icon } from "../../parts/Icon";
import { Cards, Cell } from "../Cards";
import type { Profile } from "../types";
import { differenceOf, isHot, markedPoints, type Marked } from "./marks";

/** Wells, lip and case in numbers. */
export function PointTable({ source, profile }: { source: Source; profile: Profile }) {
  const points = markedPoints(profile, source);
  const factors = new Set(points.map((point) => point.coverageFactor).filter((factor): factor is number => factor !== null));
  const [factor] = factors;
  const uncertainty = factors.size !== 1 || factor === undefined ? "U" : `U (k\u00a0=\u00a0${coverageText(factor)})`;
  const heads = ["Sensor", "Position", "t90", uncertainty, "Difference"];
  return (
    <Cards caption={
        <>
          Wells and surfaces <span class="quiet">(position from the aperture plane, difference from the reference)</span>
        </>
      } heads={heads} class="points">
      {points.map((point) => (
        <tr key={point.channel} role="row" class={point.isSilent ? "is-silent" : ""}>
          <Cell head={heads[0]!} isHeader>
            <span class="sign">{point.sign}</span> {typeset(point.name)} <code class="line">{point.channel}</code>
            {point.isReference && <span class="tag">reference</span>}
          </Cell>
          <Cell head={heads[1]!} class="number">
            {point.positionMillimetre === null ? "–" : `${fixed(point.positionMillimetre, 0)}\u00a0mm`}
          </Cell>
          <Cell head={heads[2]!} class="number">
            <Value point={point} />
          </Cell>
          <Cell head={heads[3]!} class="number">
            {point.kind === "well" && point.expandedUncertaintyKelvin === null ? "not traceable" : point.kind === "well" ? uncertaintyKelvin(point.expandedUncertaintyKelvin) : "not stated"}
            {factors.size > 1 && point.coverageFactor !== null && ` (k\u00a0=\u00a0${coverageText(point.coverageFactor)})`}
          </Cell>
          <Cell head={heads[4]!} class="number">
            {fromReference(point, profile)}
          </Cell>
        </tr>
      ))}
    </Cards>
  );
}

/** How far a sensor is from the reference; a case has nothing to do with it, and a lip carries no uncertainty to write more digits by. */
function fromReference(point: Marked, profile: Profile): string {
  const difference = differenceOf(point, profile);
  if (point.isReference) {
    return "0";
  }
  return point.kind === "case" ? "–" : point.kind === "lip" ? (difference === null ? "–" : `${fixed(difference, 1)}\u00a0K`) : differenceText(difference, point.expandedUncertaintyKelvin);
}

function Value({ point }: { point: Marked }) {
  if (point.isSilent || point.celsius === null) {
    return <span class="abnormal">silent: no present value</span>;
  }
  if (point.kind === "well") {
    return <>{celsiusText(point.celsius, point.expandedUncertaintyKelvin)}</>;
  }
  return (
    <>
      {celsius(point.celsius, 1)}
      {point.hotLimitCelsius !== null &&
        (isHot(point) ? (
          <span class="mark hazard">
            <Icon name="hazard" size={16} /> hot: above {celsius(point.hotLimitCelsius, 0)}
          </span>
        ) : (
          <span class="quiet line">alert above {celsius(point.hotLimitCelsius, 0)}</span>
        ))}
    </>
  );
}
