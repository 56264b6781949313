import type { Source } from "../../api/types";
import { outline } from "../../cavity/geometry";
import { fixed } from "../../format/numbers";
import { clockTime, span } from "../../format/time";
import { coverageText } from "../../format/uncertainty";
import { typeset } from "../../format/words";
import { ageOf, isCurrent } from "../../parts/freshness";
import { now, site } from "../../state";
import { Failed } from "../Failed";
import type { Polled } from "../polled";
import type { Profile } from "../types";
import { useWidth } from "../width";
import { Coating } from "./Coating";
import { frameOf } from "./frame";
import { differenceOf, markedPoints } from "./marks";
import { PointTable } from "./PointTable";
import { ProfileChart } from "./ProfileChart";
import { ProfileDrawing } from "./ProfileDrawing";
import { ShadeKey } from "./ShadeKey";
import { isBeyond, shadesOf } from "./shades";

/** The cavity in section with its live axial profile, drawn, charted and in numbers. */
export function ProfileSection({ source, polled }: { source: Source; polled: Polled<Profile> }) {
  const { value: profile, failure } = polled;
  return (
    <section id="cavity" tabIndex={-1} class="panel profile" aria-labelledby="cavity-title">
      <h2 id="cavity-title">Cavity and axial profile</h2>
      {failure !== null && <Failed failure={failure} what="The axial profile could not be read." onAgain={polled.again} />}
      {profile === null && failure === null && <p class="quiet">Reading…</p>}
      {profile !== null && <Drawn source={source} profile={profile} />}
      <Coating source={source} />
    </section>
  );
}

function Drawn({ source, profile }: { source: Source; profile: Profile }) {
  const [element, width] = useWidth<HTMLDivElement>();
  const isOld = !isCurrent(source);
  const shades = isOld ? null : shadesOf(profile);
  const places = profile.points.filter((point) => point.kind !== "case").map((point) => point.positionMillimetre).filter((place): place is number => place !== null);
  const frame = frameOf(outline(source.cavity), places, width);
  const wells = profile.points.filter((point) => point.kind === "well");
  return (
    <>
      {isOld && <p class="abnormal">These values are old: newest {span(ageOf(profile.at))} ago. The wall is not shaded.</p>}
      <div class={isOld ? "profile-body is-old" : "profile-body"}>
        <div ref={element} class="profile-drawings">
          <ProfileDrawing source={source} profile={profile} frame={frame} shades={shades} />
          <p class="drawing-note">
            Inner surface to scale, aperture at the left. {sightText(source)}{profile.reference?.coverageFactor != null && ` U: expanded uncertainty of the thermometer, k\u00a0=\u00a0${coverageText(profile.reference.coverageFactor)}.`}
          </p>
          {shades !== null && <ShadeKey shades={shades} />}
          <h3>Difference from the reference along the axis</h3>
          {wells.length < 2 && <p class="quiet">One well: no axial profile is measured.</p>}
          <ProfileChart source={source} profile={profile} frame={frame} height={width < 500 ? 220 : 250} />
          <p class="drawing-note">
            Bars: U of each thermometer{profile.reference?.coverageFactor != null && `, k\u00a0=\u00a0${coverageText(profile.reference.coverageFactor)}`}. Line: the interpolated profile that the effective emissivity is computed
            with. {beyondText(source, profile)}
          </p>
        </div>
        <div>
          <PointTable source={source} profile={profile} />
          <p class="quiet">
            Values of {clockTime(profile.at, site.value?.timeZone ?? "UTC", now.value, true)}
            {profile.points.some((point) => point.kind !== "well") && "; lip and case sensors carry no stated uncertainty"}.
          </p>
          {profile.notes.length > 0 && (
            <ul class="notes">
              {profile.notes.map((note) => (
                <li key={note}>{typeset(note)}</li>
              ))}
            </ul>
          )}
        </div>
      </div>
    </>
  );
}

/** How the source is looked at, in words. */
function sightText({ view }: Source): string {
  const usual = view.isStated ? "" : " (the usual view; the lab file states none)";
  switch (view.kind) {
    case "cone":
      return `Dotted: the view of the comparator, a spot of ${fixed(2 * view.spotRadiusMillimetre, 1)} mm in the aperture plane from ${fixed(view.distanceMillimetre, 0)} mm${usual}.`;
    case "beam":
      return `Dotted: the view, a beam of ${fixed(2 * view.spotRadiusMillimetre, 1)} mm${usual}.`;
    case "hemispherical":
      return `Viewed is all radiation that leaves the aperture${usual}.`;
  }
}

/** What lies off the chart, in words. */
function beyondText(source: Source, profile: Profile): string {
  const scale = shadesOf(profile, true);
  if (scale === null) {
    return "";
  }
  return markedPoints(profile, source)
    .filter((point) => point.kind === "lip" && !point.isSilent && point.celsius !== null && isBeyond(scale, point.celsius))
    .map((point) => `${point.sign} lies off the chart, at ${fixed(differenceOf(point, profile), 1)}\u00a0K; the wall's shade ends with the scale.`)
    .join(" ");
}
