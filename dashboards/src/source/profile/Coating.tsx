import type { Source } from "../../api/types";
import { fixed } from "../../format/numbers";
import { statement, valueText } from "../../format/uncertainty";
import { typeset, words } from "../../format/words";

/** The cavity in words and numbers: what the section cannot show. */
export function Coating({ source }: { source: Source }) {
  const { cavity } = source;
  const hasPlate = cavity.apertureRadiusMillimetre < cavity.radiusMillimetre && cavity.shape !== "flat-plate";
  return (
    <dl class="facts cavity-facts">
      <Fact term="Shape" value={words(cavity.shape)} />
      <Fact term="Diameter" value={`${fixed(2 * cavity.radiusMillimetre, 0)}\u00a0mm`} />
      {cavity.lengthMillimetre > 0 && <Fact term="Length" value={`${fixed(cavity.lengthMillimetre, 0)}\u00a0mm`} />}
      {cavity.coneHalfAngleDegree !== null && <Fact term="Half-angle of the cone" value={`${fixed(cavity.coneHalfAngleDegree, 0)}°`} />}
      <Fact term="Aperture" value={`${fixed(2 * cavity.apertureRadiusMillimetre, 0)}\u00a0mm${hasPlate ? ", with aperture plate" : ", no aperture plate"}`} />
      {cavity.coating.map((coating) => (
        <Fact
          key={coating.band}
          term={`Coating emissivity, ${typeset(source.bands.find((band) => band.id === coating.band)?.name ?? coating.band)}`}
          value={emissivity(coating.emissivity, coating.emissivityStandardUncertainty)}
        />
      ))}
      {cavity.coating.map(
        (coating) =>
          coating.secondEmissivity !== null && (
            <Fact key={coating.band} term={`Emissivity of the ${words(cavity.secondMaterial).toLowerCase()}, ${coating.band}`} value={emissivity(coating.secondEmissivity, coating.secondEmissivityStandardUncertainty)} />
          ),
      )}
    </dl>
  );
}

function emissivity(value: number, standardUncertainty: number | null): string {
  const expanded = standardUncertainty === null ? null : 2 * standardUncertainty;
  return expanded === null ? fixed(value, 3) : `${valueText(value, expanded, 3)}, ${statement(expanded, 2, "")}`;
}

const Fact = ({ term, value }: { term: string; value: string }) => (
  <div>
    <dt>{term}</dt>
    <dd>{value}</dd>
  </div>
);
