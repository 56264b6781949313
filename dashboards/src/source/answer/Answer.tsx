import type { Source } from "../../api/types";
import { celsius } from "../../format/numbers";
import { span } from "../../format/time";
import { celsiusText, differenceText, statement, uncertaintyKelvin } from "../../format/uncertainty";
import { readinessMeaning, readinessWord } from "../../format/words";
import { standing } from "../../hazards/board";
import { ageOf, isCurrent } from "../../parts/freshness";
import { Icon, readinessIcon } from "../../parts/Icon";
import { presentReadiness } from "../../runs/standing";
import { alerts } from "../../state";
import { Reasons } from "./Reasons";

/** May I calibrate with this source now? The answer, and what is missing for it. */
export function Answer({ source }: { source: Source }) {
  const fresh = isCurrent(source);
  const readiness = presentReadiness(source, fresh);
  const setPoint = source.status.setPointCelsius;
  const hazards = standing(alerts.value.filter((alert) => alert.source === source.id)).length;
  return (
    <section id="answer" tabIndex={-1} class="panel answer" aria-labelledby="answer-title">
      <h2 id="answer-title">May I calibrate with it now{fresh && setPoint !== null ? `, at ${celsius(setPoint)}` : ""}?</h2>
      <div class="answer-body">
        <div>
          <p class={`readiness ${readiness.state}`}>
            <Icon name={readinessIcon[readiness.state]} size={30} />
            <strong>{readinessWord[readiness.state]}</strong>
          </p>
          <p class="quiet">{readinessMeaning[readiness.state]}</p>
          {hazards > 0 && (
            <p class="mark hazard">
              <Icon name="hazard" />
              <a href="#hazards">
                {hazards} standing hazard{hazards === 1 ? "" : "s"}
              </a>
            </p>
          )}
          <Reasons source={source} readiness={readiness} />
        </div>
        <Measured source={source} fresh={fresh} />
      </div>
    </section>
  );
}

function Measured({ source, fresh }: { source: Source; fresh: boolean }) {
  const { temperature, setPointCelsius, newestReadingAt } = source.status;
  const age = newestReadingAt === null ? null : ageOf(newestReadingAt);
  if (temperature === null) {
    return <p class="measured">{age === null ? "No reading of this source has arrived yet." : `No temperature; newest reading ${span(age)} ago.`}</p>;
  }
  const uncertainty = temperature.expandedUncertaintyKelvin;
  const isMilli = uncertainty !== null && uncertainty < 1;
  return (
    <div class={fresh ? "measured" : "measured old"}>
      <h3>Reference thermometer, t90</h3>
      <p class="value">
        {!fresh && <span class="was">was </span>}
        <span class="number">{celsiusText(temperature.celsius, uncertainty)}</span>
      </p>
      <p class="quiet">
        {uncertainty === null ? "no uncertainty stated" : statement(uncertainty * (isMilli ? 1000 : 1), temperature.coverageFactor, isMilli ? "mK" : "K")}
        {temperature.certificate !== null && ", of its certificate"}
      </p>
      <dl class="facts">
        <div>
          <dt>Set point</dt>
          <dd>{setPointCelsius === null ? "not reported" : celsius(setPointCelsius)}</dd>
        </div>
        <div>
          <dt>Off by</dt>
          <dd>{setPointCelsius === null || !fresh ? "–" : differenceText(temperature.celsius - setPointCelsius, uncertainty)}</dd>
        </div>
        <div>
          <dt>Newest</dt>
          <dd class={fresh ? "" : "abnormal"}>{age === null ? "never" : `${span(age)} ago`}</dd>
        </div>
      </dl>
      {!temperature.insideCertificateRange && (
        <p class="mark deviation">
          <Icon name="deviation" />
          {temperature.certificate === null
            ? "No certificate in force: not traceable."
            : `Outside the certificate's range: not traceable${uncertainty === null ? "" : `; U ${uncertaintyKelvin(uncertainty)} does not hold there`}.`}
        </p>
      )}
    </div>
  );
}
