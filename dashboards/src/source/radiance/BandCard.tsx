import type { ComponentChildren } from "preact";
import type { Assessment, Source } from "../../api/types";
import { celsius, fixed } from "../../format/numbers";
import { celsiusText, coverageText, decimalsOf, statement, uncertaintyText, valueText } from "../../format/uncertainty";
import { typeset, words } from "../../format/words";
import { bandName, scopeOf } from "../criteria";
import { Decision } from "../Decision";
import { assessedUncertainty, assessedValue, limitPhrase } from "../quantity";
import type { BandProfile, Comparator, Stated } from "../types";

const methodName: Record<string, string> = {
  "ring-kernels": "ring kernels (diffuse walls, integral equation)",
  "monte-carlo": "traced rays (diffuse and specular walls)",
  "flat-plate": "flat plate (emissivity of the surface)",
  "closed-form": "closed form (diffuse sphere)",
};

interface BandCardProps { band: BandProfile; source: Source; assessments: Assessment[]; onOpen: (id: string) => void }

/** One working band: what the model says, what the comparator says, and what was decided. */
export function BandCard({ band, source, assessments, onOpen }: BandCardProps) {
  const title = `band-${band.band}`;
  return (
    <article class="band-card" aria-labelledby={title}>
      <h3 id={title}>{bandName(band)}</h3>
      <dl class="fact-rows">
        <Row term="Offset of the radiance temperature" strong>
          <Value stated={band.offsetMillikelvin} unit="mK" signed />
        </Row>
        <Row term="Radiance temperature">
          <RadianceTemperature stated={band.radianceTemperature} />
        </Row>
        <Row term="Effective emissivity, live profile" strong>
          <Value stated={band.effectiveEmissivity} unit="" />
        </Row>
        <Row term="Effective emissivity, isothermal">
          <Value stated={band.isothermalEffectiveEmissivity} unit="" />
        </Row>
        <Row term="Surroundings">{band.surroundingsCelsius === null ? "not measured" : celsius(band.surroundingsCelsius, 1)}</Row>
        <Row term="Method">{methodName[band.method] ?? words(band.method)}</Row>
        {band.comparators.length === 0 ? (
          <Row term="Comparator">none in this band</Row>
        ) : (
          band.comparators.map((comparator) => (
            <Row key={comparator.channel} term={band.comparators.length === 1 ? "Comparator" : typeset(comparator.name)}>
              <ComparatorText comparator={comparator} />
            </Row>
          ))
        )}
        <Row term="Baseline">
          <BaselineText band={band} />
        </Row>
        {assessments.length === 0 && <Row term="Change, assessed">not assessed yet</Row>}
        {assessments.map((assessment) => (
          <Row key={assessment.id} term={`Change, assessed by ${scopeOf(assessment.scope, source)?.channel === null ? "model" : "comparator"}`}>
            <Judged assessment={assessment} onOpen={onOpen} />
          </Row>
        ))}
      </dl>
    </article>
  );
}

function Row({ term, strong, children }: { term: string; strong?: boolean; children: ComponentChildren }) {
  return (
    <div class={strong === true ? "strong" : ""}>
      <dt>{term}</dt>
      <dd>{children}</dd>
    </div>
  );
}

/** A value, its expanded uncertainty with two digits, and k; never one without the others. */
function Value({ stated, unit, signed }: { stated: Stated | null | undefined; unit: string; signed?: boolean }) {
  if (stated == null) {
    return <>no value</>;
  }
  const end = unit === "" ? "" : `\u00a0${unit}`;
  const text = valueText(stated.value, stated.expandedUncertainty, unit === "" ? 5 : 0);
  const sign = signed === true && stated.value > 0 && /[1-9]/.test(text) ? "+" : "";
  return (
    <>
      <span class="number">
        {sign}
        {text}
        {end}
      </span>{" "}
      <span class="quiet number">
        {decimalsOf(stated.expandedUncertainty) === null
          ? "no uncertainty stated"
          : `U\u00a0=\u00a0${uncertaintyText(stated.expandedUncertainty)}${end}, k\u00a0=\u00a0${coverageText(stated.coverageFactor)}`}
      </span>
    </>
  );
}

function RadianceTemperature({ stated }: { stated: Stated | null | undefined }) {
  if (stated == null) {
    return <>no value</>;
  }
  const uncertainty = stated.expandedUncertainty;
  const isMilli = uncertainty !== null && uncertainty < 1;
  return (
    <>
      <span class="number">{celsiusText(stated.value, uncertainty)}</span>{" "}
      <span class="quiet number">{statement(uncertainty === null || !isMilli ? uncertainty : uncertainty * 1000, stated.coverageFactor, isMilli ? "mK" : "K")}</span>
    </>
  );
}

function ComparatorText({ comparator }: { comparator: Comparator }) {
  return (
    <>
      {comparator.celsius === null ? "no present reading" : `reads ${celsius(comparator.celsius, 2)}`}
      {comparator.effectiveEmissivity !== null && (
        <>
          ; effective emissivity <Value stated={comparator.effectiveEmissivity} unit="" />
        </>
      )}
      {comparator.showsChangeOnly && <p class="quiet">It was calibrated against this very source: it shows change, not a value of its own.</p>}
      {comparator.refusal !== null && <p>It decides nothing: {closed(typeset(comparator.refusal))}</p>}
    </>
  );
}

/** With a full stop at its end. */
const closed = (text: string): string => (/[.!?]$/.test(text) ? text : `${text}.`);

function BaselineText({ band }: { band: BandProfile }) {
  const { baseline, effectiveEmissivity } = band;
  if (baseline === null) {
    return <>none on record: the design value, isothermal with the stated optics, serves instead</>;
  }
  const change = effectiveEmissivity === null ? null : effectiveEmissivity.value - baseline.effectiveEmissivity;
  const decimals = Math.max(4, decimalsOf(baseline.expandedUncertainty) ?? 4);
  return (
    <>
      <span class="number">{valueText(baseline.effectiveEmissivity, baseline.expandedUncertainty, 5)}</span>{" "}
      {baseline.expandedUncertainty !== null && <span class="quiet number">{statement(baseline.expandedUncertainty, 2, "")}</span>} <span class="quiet">({typeset(baseline.from)})</span>
      {change !== null && (
        <p>
          Change of the live value since then:{" "}
          <span class="number">
            {change > 0 ? "+" : ""}
            {fixed(change, decimals)}
          </span>
        </p>
      )}
    </>
  );
}

function Judged({ assessment, onOpen }: { assessment: Assessment; onOpen: (id: string) => void }) {
  return (
    <>
      <Decision decision={assessment.decision} />
      {assessment.value !== null && (
        <>
          : <span class="number">{assessedValue(assessment)}</span>, <span class="number">{assessedUncertainty(assessment)}</span>, <span class="number">{limitPhrase(assessment)}</span>
        </>
      )}{" "}
      <button type="button" class="as-link" onClick={() => onOpen(assessment.id)}>
        Show<span class="hidden"> the assessment of the effective emissivity</span>
      </button>
    </>
  );
}
