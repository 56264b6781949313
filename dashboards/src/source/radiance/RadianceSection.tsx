import type { Assessment, Source } from "../../api/types";
import { clockTime } from "../../format/time";
import { typeset } from "../../format/words";
import { isCurrent } from "../../parts/freshness";
import { now, site } from "../../state";
import { scopeOf } from "../criteria";
import type { Polled } from "../polled";
import type { Profile } from "../types";
import { BandCard } from "./BandCard";

interface RadianceSectionProps { source: Source; polled: Polled<Profile>; assessments: Assessment[]; onOpen: (id: string) => void }

/** What the cavity radiates in each working band, and how far that is from a blackbody at the reference temperature. */
export function RadianceSection({ source, polled, assessments, onOpen }: RadianceSectionProps) {
  const profile = polled.value;
  const judged = assessments.filter((assessment) => assessment.criterion === "effective-emissivity");
  return (
    <section id="radiance" tabIndex={-1} class="panel" aria-labelledby="radiance-title">
      <h2 id="radiance-title">Radiance by working band</h2>
      {profile === null ? (
        <p class="quiet">{polled.failure === null ? "Reading…" : "Nothing can be said without the axial profile."}</p>
      ) : profile.bands.length === 0 ? (
        <p>
          There is no model of this cavity yet: the lab file states no coating optics for a working band, or too little is measured. {profile.notes.map(typeset).join(" ")}
        </p>
      ) : (
        <>
          {!isCurrent(source) && <p class="abnormal">These values are old: of {clockTime(profile.at, site.value?.timeZone ?? "UTC", now.value, true)}.</p>}
          <div class={isCurrent(source) ? "band-grid" : "band-grid is-old"}>
            {profile.bands.map((band) => (
              <BandCard key={band.band} band={band} assessments={judged.filter((assessment) => scopeOf(assessment.scope, source)?.band.id === band.band)} source={source} onOpen={onOpen} />
            ))}
          </div>
          <p class="quiet">
            Offset: radiance temperature (emissivity setting 1) less t90 of the reference. An instrument that is compared with the thermometer alone seems wrong by this much. Negative where the source looks colder than its
            thermometer.
          </p>
        </>
      )}
    </section>
  );
}
