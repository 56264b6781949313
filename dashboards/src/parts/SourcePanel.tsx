import type { Assessment, Source, Reason } from "../api/types";
import { CavitySection } from "../cavity/CavitySection";
import { celsius, decimalsFor, fixed, kelvin, significant } from "../format/numbers";
import { clockTime, span } from "../format/time";
import { unitText } from "../format/units";
import { decisionWord, figureWord, kindWord, readinessMeaning, readinessWord, typeset, words } from "../format/words";
import { gone, standing } from "../hazards/board";
import { sourceAddress } from "../shell/routes";
import { alerts, assessments, now, site } from "../state";
import { ageOf, isCurrent } from "./freshness";
import { Icon, readinessIcon } from "./Icon";
import { panelId, presentState } from "./ReadinessStrip";

/** One source: may it be calibrated with now, at what temperature, and what stands against it. */
export function SourcePanel({ source, onShow }: { source: Source; onShow?: (source: Source) => void }) {
  const fresh = isCurrent(source);
  const state = presentState(source);
  const open = alerts.value.filter((alert) => alert.source === source.id);
  const hazards = standing(open).length;
  const past = gone(open).length;
  const others = open.length - hazards - past;
  const heading = `source-${source.source}`;
  return (
    <article id={panelId(source)} tabIndex={-1} class="panel source" aria-labelledby={heading}>
      <header>
        <h3 id={heading}>
          <a href={sourceAddress(source.id)}>{typeset(source.name)}</a>
        </h3>
        <p class="quiet">
          {kindWord[source.kind] ?? words(source.kind)}, {fixed(source.minimumCelsius, 0)} to {celsius(source.maximumCelsius, 0)}
        </p>
      </header>
      <p class={`readiness ${state}`} title={readinessMeaning[state]}>
        <Icon name={readinessIcon[state]} size={26} />
        <strong>{readinessWord[state]}</strong>
      </p>
      {hazards > 0 && (
        <p class="mark hazard">
          <Icon name="hazard" />
          <a href="/#hazards">
            {hazards} standing hazard{hazards === 1 ? "" : "s"}
          </a>
        </p>
      )}
      {past > 0 && (
        <p class="quiet">
          <a href="/#gone">
            {past} hazard{past === 1 ? "" : "s"} gone, not yet acknowledged
          </a>
        </p>
      )}
      {others > 0 && (
        <p class="mark deviation">
          <Icon name="deviation" />
          <a href="/#alerts">
            {others} other open alert{others === 1 ? "" : "s"}
          </a>
        </p>
      )}
      <Measured source={source} fresh={fresh} />
      <CavitySection source={source} isCurrent={fresh} />
      <Reasons source={source} fresh={fresh} />
      <Stability assessment={latestStability(source)} />
      {onShow !== undefined && (
        <footer>
          <button type="button" onClick={() => onShow(source)}>
            Show in chart<span class="hidden"> {source.name}</span>
          </button>
        </footer>
      )}
    </article>
  );
}

const zone = (): string => site.value?.timeZone ?? "UTC";

const latestStability = (source: Source): Assessment | undefined =>
  assessments.value.find((assessment) => assessment.source === source.id && assessment.criterion === "stability");

function Measured({ source, fresh }: { source: Source; fresh: boolean }) {
  const { temperature, setPointCelsius, newestReadingAt } = source.status;
  const decimals = decimalsFor(temperature?.expandedUncertaintyKelvin ?? null);
  const age = newestReadingAt === null ? null : ageOf(newestReadingAt);
  if (temperature === null) {
    return <p class="measured">{age === null ? "No reading yet." : `No temperature; newest reading ${span(age)} ago.`}</p>;
  }
  return (
    <div class={fresh ? "measured" : "measured old"}>
      <p class="value">
        {!fresh && <span class="was">was </span>}
        <span class="number">{fixed(temperature.celsius, decimals)}</span> °C
        {fresh && temperature.expandedUncertaintyKelvin !== null && (
          <span class="quiet" title="Expanded uncertainty that the thermometer's certificate states">
            {" "}
            U = {kelvin(temperature.expandedUncertaintyKelvin)}, k = {fixed(temperature.coverageFactor, 0)}
          </span>
        )}
      </p>
      <dl class="facts">
        <div>
          <dt>Set point</dt>
          <dd>{setPointCelsius === null ? "not reported" : celsius(setPointCelsius)}</dd>
        </div>
        <div>
          <dt>Off by</dt>
          <dd>{setPointCelsius === null || !fresh ? "–" : kelvin(temperature.celsius - setPointCelsius)}</dd>
        </div>
        <div>
          <dt>Newest</dt>
          <dd class={fresh ? "" : "abnormal"}>{age === null ? "never" : `${span(age)} ago`}</dd>
        </div>
      </dl>
      {!temperature.insideCertificateRange && (
        <p class="mark deviation">
          <Icon name="deviation" />
          {temperature.certificate === null ? "No certificate in force: not traceable." : "Outside the certificate's range: not traceable."}
        </p>
      )}
    </div>
  );
}

function Reasons({ source, fresh }: { source: Source; fresh: boolean }) {
  if (!fresh) {
    return <p class="reasons">Nothing can be said about the present: {source.status.newestReadingAt === null ? "there is no reading yet." : "the readings are old."}</p>;
  }
  const { reasons, state } = source.status.readiness;
  if (reasons.length === 0) {
    return <p class="reasons quiet">{readinessMeaning[state]}</p>;
  }
  const list = (shown: Reason[]) => (
    <ul>
      {shown.map((reason) => (
        <li key={reason.code + reason.text} class={reason.blocks ? "" : "quiet"}>
          {typeset(reason.text.startsWith(`${source.name}, `) ? reason.text.slice(source.name.length + 2) : reason.text)}
        </li>
      ))}
    </ul>
  );
  const missing = reasons.filter((reason) => reason.blocks);
  const others = reasons.filter((reason) => !reason.blocks);
  return (
    <>
      {missing.length > 0 && <div class="reasons">{list(missing)}</div>}
      {others.length > 0 && (
        <details class="reasons">
          <summary>{state === "ready" ? "Why ready" : `What else is known (${others.length})`}</summary>
          {list(others)}
        </details>
      )}
    </>
  );
}

function Stability({ assessment }: { assessment: Assessment | undefined }) {
  if (assessment === undefined) {
    return <p class="stability quiet">Stability: not assessed yet.</p>;
  }
  const isOut = assessment.decision === "fail" || assessment.decision === "conditional-fail";
  return (
    <details class="stability">
      <summary>
        Stability: <span class={isOut ? "abnormal" : ""}>{isOut && <Icon name="deviation" size={15} />} {decisionWord[assessment.decision]}</span>
        {assessment.value !== null && assessment.decision !== "not-decided" && (
          <>
            , {significant(assessment.value)} {unitText(assessment.unit)}
            {assessment.limit !== null && (
              <span class="quiet">
                {" "}
                of {significant(assessment.limit)} {unitText(assessment.unit)}
              </span>
            )}
          </>
        )}
      </summary>
      <p>{typeset(assessment.explanation)}</p>
      <ul class="figures">
        {assessment.figures.map((figure) => (
          <li key={figure.name}>
            {figureWord[figure.name] ?? words(figure.name)}: {significant(figure.value)} {unitText(figure.unit)}
            {figure.standardUncertainty !== null && ` (u = ${significant(figure.standardUncertainty, 2)} ${unitText(figure.unit)})`}
          </li>
        ))}
      </ul>
      <p class="quiet">
        {clockTime(assessment.windowStart, zone(), now.value)} to {clockTime(assessment.windowEnd, zone(), now.value)}
        {assessment.revision > 1 && `, revision ${assessment.revision}: ${assessment.supersedeReason ?? ""}`}
      </p>
    </details>
  );
}
