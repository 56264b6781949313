import type { ComponentChildren } from "preact";
import { fixed, significant } from "../../format/numbers";
import { day } from "../../format/time";
import { unitText } from "../../format/units";
import { coverageText, uncertaintyText, valueText } from "../../format/uncertainty";
import type { Forecast } from "./types";

const space = "\u00a0";

/** Trend, crossing and charts of one series in numbers. */
export function DriftFacts({ forecast, zone }: { forecast: Forecast; zone: string }) {
  const unit = unitText(forecast.unit);
  const tail = unit === "" ? "" : space + unit;
  const date = (instant: string): string => day(new Date(instant), zone);
  const { slopePerYear: slope, chart } = forecast;
  return (
    <dl class="fact-rows">
      {slope !== null && (
        <Row term="Slope a year">
          {slope.value > 0 ? "+" : ""}
          {valueText(slope.value, slope.expandedUncertainty, 5)}
          {tail}, U{space}={space}
          {uncertaintyText(slope.expandedUncertainty)}
          {tail}, k{space}={space}
          {coverageText(slope.coverageFactor)} ({forecast.isSignificant ? "more than chance makes" : "no more than chance makes"})
        </Row>
      )}
      {forecast.medianSlopePerYear !== null && (
        <Row term="Median slope a year (Theil-Sen)">
          {significant(forecast.medianSlopePerYear)}
          {tail}; probability without a trend (Mann-Kendall) {fixed(forecast.mannKendallProbability, 2)}
        </Row>
      )}
      {forecast.limit !== null && slope !== null && (
        <Row term="Limit reached">
          {forecast.isSignificant && forecast.expected !== null
            ? `about ${date(forecast.expected)}; 95${space}% between ${forecast.earliest === null ? "now" : date(forecast.earliest)} and ${forecast.latest === null ? "later than ten years from now" : date(forecast.latest)}`
            : forecast.earliest === null
              ? "not within ten years"
              : `not before ${date(forecast.earliest)} (95${space}%); whether at all cannot be told`}
        </Row>
      )}
      {chart !== null && (
        <>
          <Row term="Moving average (EWMA)">
            {fixed(chart.ewma, 2)} against ±{fixed(chart.ewmaLimit, 2)} standard deviations; mean run length {fixed(chart.ewmaRunLength, 0)} days without a change, {fixed(chart.ewmaRunLengthAtOne, 0)} at a change of one
          </Row>
          <Row term="Cumulative sums (CUSUM)">
            up {fixed(chart.cusumUpper, 2)}, down {fixed(chart.cusumLower, 2)} against {fixed(chart.cusumLimit, 2)}; mean run length {fixed(chart.cusumRunLength, 0)} days without a change, {fixed(chart.cusumRunLengthAtOne, 0)} at a change of one
          </Row>
          <Row term="Signal">{chart.signal === "none" ? "none" : `${chart.signal} since ${date(chart.signalsSince ?? "")}`}</Row>
        </>
      )}
      <Row term="Rests on">
        {forecast.assessments} assessment{forecast.assessments === 1 ? "" : "s"} in {forecast.days.length} day{forecast.days.length === 1 ? "" : "s"}
      </Row>
    </dl>
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
