import type { Source } from "../api/types";
import { celsius, kelvin } from "../format/numbers";
import { interpolate, outline, pieces, radiusAt, type Point, type Well } from "./geometry";

const width = 360;
const height = 158;
const frame = { left: 30, right: 14, top: 28, bottom: 22 };
const wall = 8;

/** The wells of a source that have a place on the axis, with what they measure now (nothing where that is old). */
export function wellsOf(source: Source, isCurrent: boolean): Well[] {
  return source.channels
    .filter((channel) => channel.quantity === "well-thermometer" && channel.axialPositionMillimetre !== null)
    .map((channel) => {
      const newest = source.status.newest.find((reading) => reading.channel === channel.id);
      return {
        id: channel.id,
        name: channel.name,
        x: channel.axialPositionMillimetre!,
        celsius: isCurrent && newest !== undefined && !newest.isSilent ? newest.celsius : null,
        isReference: channel.isReference,
      };
    })
    .sort((one, other) => one.x - other.x);
}

/** A source's cavity in section: aperture at the left, wells where they sit, the wall shaded by what they measure. */
export function CavitySection({ source, isCurrent }: { source: Source; isCurrent: boolean }) {
  const line = outline(source.cavity);
  const wells = wellsOf(source, isCurrent);
  const measured = wells.map((well) => well.celsius).filter((value): value is number => value !== null);
  const low = Math.min(...measured);
  const high = Math.max(...measured);
  const place = scale(line, wells);
  const caseRadius = Math.max(...line.map((point) => point.r)) * place.unit + 24;
  const end = Math.max(...line.map((point) => point.x)) * place.unit;
  const isPlate = source.cavity.shape === "flat-plate";
  const reference = wells.find((well) => well.isReference);
  const summary = describe(source, wells);

  const shade = (x: number): string => {
    const value = interpolate(wells, x);
    if (value === null) {
      return "var(--wall-unknown)";
    }
    const share = high > low ? (value - low) / (high - low) : 1;
    return `color-mix(in oklab, var(--wall-hot) ${Math.round(share * 100)}%, var(--wall-cold))`;
  };
  const stroke = pieces(line, 6 / place.unit);
  const edge = Math.max(source.cavity.apertureRadiusMillimetre * place.unit, 2);

  return (
    <figure class="cavity">
      <svg viewBox={`0 0 ${width} ${height}`} role="img" aria-label={summary}>
        <g transform={`translate(${frame.left} ${frame.top + place.middle})`}>
          <rect class="case" x={-4} y={-caseRadius} width={end + 30} height={2 * caseRadius} rx={6} />
          {!isPlate && <path class="hollow" d={hollow(line, place.unit)} />}
          {[1, -1].map((side) =>
            line
              .slice(1, -1)
              .map((point, i) => <circle key={`${side}-${i}`} class="joint" cx={point.x * place.unit} cy={-side * point.r * place.unit} r={wall / 2} style={{ fill: shade(point.x) }} />),
          )}
          {[1, -1].map((side) =>
            stroke.map(([from, to], i) => (
              <line
                key={`${side}-${i}`}
                class="wall"
                x1={from.x * place.unit}
                y1={-side * from.r * place.unit}
                x2={to.x * place.unit}
                y2={-side * to.r * place.unit}
                stroke-width={wall}
                stroke-linecap={from.x === to.x ? "butt" : "square"}
                style={{ stroke: shade((from.x + to.x) / 2) }}
              />
            )),
          )}
          <rect class="lip" x={-10} y={-caseRadius} width={7} height={caseRadius - edge} />
          <rect class="lip" x={-10} y={edge} width={7} height={caseRadius - edge} />
          <line class="axis" x1={-24} x2={end + 12} y1={0} y2={0} />
          {wells.map((well, i) => (
            <WellMark key={well.id} well={well} number={i + 1} line={line} unit={place.unit} end={end} caseRadius={caseRadius} />
          ))}
        </g>
        <text class="small" x={frame.left - 12} y={height - 4}>
          aperture
        </text>
      </svg>
      <figcaption>
        <ol class="well-list">
          {wells.map((well) => (
            <li key={well.id}>
              {well.name}
              {well.isReference && " (reference)"}: <span class="number">{wellText(well, reference)}</span>
            </li>
          ))}
        </ol>
        <ProfileKey wells={wells} />
      </figcaption>
    </figure>
  );
}

function WellMark(props: { well: Well; number: number; line: Point[]; unit: number; end: number; caseRadius: number }) {
  const { well, number, line, unit, end, caseRadius } = props;
  const x = well.x * unit;
  const y = -(radiusAt(line, well.x) * unit + wall / 2 + 5);
  return (
    <g class={well.isReference ? "well reference" : "well"}>
      <line class="bore" x1={x} x2={end + 26} y1={y} y2={y} />
      <line class="leader" x1={x} x2={x} y1={y - 4} y2={-caseRadius - 4} />
      <circle cx={x} cy={y} r={well.isReference ? 5 : 4} />
      <text x={x} y={-caseRadius - 8} text-anchor="middle">
        {number}
      </text>
    </g>
  );
}

/** The reference well's temperature, and how far the others are from it. */
function wellText(well: Well, reference: Well | undefined): string {
  if (well.celsius === null) {
    return "no current value";
  }
  return well.isReference || reference?.celsius == null ? celsius(well.celsius) : signed(well.celsius - reference.celsius);
}

const signed = (difference: number): string => (difference > 0 ? "+" : "") + kelvin(difference);

/** How the shades of the wall are to be read. */
function ProfileKey({ wells }: { wells: Well[] }) {
  const known = wells.map((well) => well.celsius).filter((value): value is number => value !== null);
  if (known.length === 0) {
    return <p>The wall is not shaded: there are no current temperatures.</p>;
  }
  if (known.length === 1) {
    return <p>One well: no axial profile is measured.</p>;
  }
  return (
    <p class="shades">
      <span>coldest well</span> <span class="ramp" aria-hidden="true" /> <span>hottest, {signed(Math.max(...known) - Math.min(...known))}</span>
    </p>
  );
}

function scale(line: Point[], wells: Well[]): { unit: number; middle: number } {
  const longest = Math.max(...line.map((point) => point.x), ...wells.map((well) => well.x), 1);
  const widest = Math.max(...line.map((point) => point.r), 1);
  const free = { x: width - frame.left - frame.right - 26, y: height - frame.top - frame.bottom };
  const unit = Math.min(free.x / longest, (free.y / 2 - 24) / widest);
  return { unit, middle: free.y / 2 };
}

function hollow(line: Point[], unit: number): string {
  const upper = line.map((point) => `${(point.x * unit).toFixed(1)} ${(-point.r * unit).toFixed(1)}`);
  const lower = [...line].reverse().map((point) => `${(point.x * unit).toFixed(1)} ${(point.r * unit).toFixed(1)}`);
  return `M${[...upper, ...lower].join("L")}Z`;
}

function describe(source: Source, wells: Well[]): string {
  const list = wells.map((well) => `${well.name} at ${well.x} mm: ${well.celsius === null ? "no current value" : celsius(well.celsius, 3)}`);
  return `Section of the cavity of ${source.name}, aperture at the left. ${list.join("; ")}.`;
}
