import type { Source } from "../../api/types";
import { celsius, fixed } from "../../format/numbers";
import { differenceText, uncertaintyKelvin } from "../../format/uncertainty";
import { typeset } from "../../format/words";
import { Cards, Cell } from "../Cards";
import { bandName } from "../criteria";
import { Failed } from "../Failed";
import { usePolled } from "../polled";
import { readAttribution } from "../requests";
import { CoatingDrawing } from "./CoatingDrawing";
import type { Finding } from "./types";

const readSeconds = 300;

const verdictWord: Record<Finding["verdict"], string> = {
  "nothing-to-explain": "Nothing to explain",
  explained: "Explained",
  "cannot-be-told-apart": "Cannot be told apart",
  unexplained: "Not explained",
  "no-data": "Not known yet",
};

/** What may lie behind what the comparators show, and which coatings explain it. */
export function AttributionSection({ source }: { source: Source }) {
  const polled = usePolled(source.id, (signal) => readAttribution(source.id, signal), readSeconds * 1000);
  const held = polled.value;
  return (
    <section id="causes" tabIndex={-1} class="panel" aria-labelledby="causes-title">
      <h2 id="causes-title">What lies behind a deviation</h2>
      {polled.failure !== null && <Failed failure={polled.failure} what="The causes could not be read." onAgain={polled.again} />}
      {held === null && polled.failure === null && <p class="quiet">Reading…</p>}
      {held?.findings.map((finding) => <FindingText key={finding.basis + finding.sources.join()} finding={finding} source={source} />)}
      {held !== null && (
        <>
          <h3>Coating, as the comparators show it</h3>
          {held.coatings.length === 0 ? (
            <p>No comparator has been decided on yet.</p>
          ) : (
            held.coatings.map((coating) => (
              <figure key={coating.channel}>
                <figcaption>{bandName(source.bands.find((band) => band.id === coating.band) ?? { name: coating.band })}</figcaption>
                <CoatingDrawing coating={coating} />
                <p>{typeset(coating.explanation)}</p>
              </figure>
            ))
          )}
        </>
      )}
    </section>
  );
}

function FindingText({ finding, source }: { finding: Finding; source: Source }) {
  const isJoint = finding.sources.length > 1;
  const title = isJoint ? "Jointly with the sources that share a comparator" : finding.basis === "change" ? "Since the reference days" : "Against the model of the cavity";
  const isAbnormal = finding.verdict !== "nothing-to-explain" && finding.verdict !== "no-data";
  return (
    <div>
      <h3>
        {title}: <span class={isAbnormal ? "abnormal" : ""}>{verdictWord[finding.verdict]}</span>
      </h3>
      <p>{typeset(finding.explanation)}</p>
      {finding.wouldSeparate.length > 0 && (
        <ul class="squares">
          {finding.wouldSeparate.map((sentence) => (
            <li key={sentence}>{sentence}</li>
          ))}
        </ul>
      )}
      {isAbnormal && finding.suspects.length > 0 && (
        <p class="quiet">{finding.suspects.map((cause) => `${cause.text}: ${fixed(100 * cause.probability, 0)}\u00a0%`).join("; ")}</p>
      )}
      {finding.deviations.length > 0 && (
        <details>
          <summary>Deviations weighed</summary>
          <Cards caption={`Deviations of ${source.name}`} isCaptionHidden heads={["Band", "Comparator", "At", "Deviation", "U (k = 2)", "Days"]}>
            {finding.deviations.map((deviation) => (
              <tr key={`${deviation.source}${deviation.comparator}${deviation.band}${deviation.setPointCelsius}`} role="row">
                <Cell head="Band" isHeader>
                  {typeset(deviation.band)}
                </Cell>
                <Cell head="Comparator">{deviation.comparator}</Cell>
                <Cell head="At" class="number">
                  {deviation.setPointCelsius === null ? "–" : celsius(deviation.setPointCelsius, 0)}
                </Cell>
                <Cell head="Deviation" class="number">
                  {differenceText(deviation.kelvin, 2 * deviation.standardUncertainty)}
                </Cell>
                <Cell head="U (k = 2)" class="number">
                  {uncertaintyKelvin(2 * deviation.standardUncertainty)}
                </Cell>
                <Cell head="Days" class="number">
                  {deviation.recentDays}
                  {deviation.referenceDays > 0 && ` against ${deviation.referenceDays}`}
                </Cell>
              </tr>
            ))}
          </Cards>
        </details>
      )}
    </div>
  );
}
