import { clockTime } from "../../format/time";
import { now, site } from "../../state";
import type { FullAssessment } from "../types";

/** All that is needed to compute an assessment again. */
export function ProvenanceList({ assessment }: { assessment: FullAssessment }) {
  const { provenance } = assessment;
  const zone = site.value?.timeZone ?? "UTC";
  return (
    <dl class="fact-rows">
      <div>
        <dt>Readings, SHA-256 of their canonical form</dt>
        <dd>
          <code class="digest">{provenance.readingsDigest}</code>
        </dd>
      </div>
      <div>
        <dt>Source-hours read</dt>
        <dd class="number">{provenance.hours.map((hour) => `${clockTime(hour.hour, zone, now.value)} (revision ${hour.revision})`).join(", ") || "none"}</dd>
      </div>
      <div>
        <dt>Certificates</dt>
        <dd>{provenance.certificates.join(", ") || "none"}</dd>
      </div>
      <div>
        <dt>Limit</dt>
        <dd>{provenance.limit ?? "none"}</dd>
      </div>
      {provenance.source != null && (
        <div>
          <dt>Source as configured</dt>
          <dd>{provenance.source}</dd>
        </div>
      )}
      <div>
        <dt>Program version</dt>
        <dd>{provenance.programVersion}</dd>
      </div>
      <div>
        <dt>Id of the assessment</dt>
        <dd>
          <code class="digest">{assessment.id}</code>
        </dd>
      </div>
    </dl>
  );
}
