import { outline, pieces, radiusAt, sightRadius, type Point } from "../../cavity/geometry";
import type { Source } from "../../api/types";
import { celsius } from "../../format/numbers";
import { celsiusText, uncertaintyKelvin } from "../../format/uncertainty";
import type { Profile } from "../types";
import { stagger, xOf, type Frame } from "./frame";
import { markedPoints, type Marked } from "./marks";
import { curveAt, shareOf, type Shades } from "./shades";

const wall = 9;
const gap = 20;
const line = { height: 15, pad: 8 };

interface ProfileDrawingProps { source: Source; profile: Profile; frame: Frame; shades: Shades | null }

/** The cavity in section, to scale along and across: aperture at the left, the wall shaded by the measured profile, values at the wells. */
export function ProfileDrawing({ source, profile, frame, shades }: ProfileDrawingProps) {
  const contour = outline(source.cavity);
  const points = markedPoints(profile, source);
  const wells = points.filter((point) => point.kind === "well" && point.positionMillimetre !== null);
  const labels = labelsOf(wells, frame);
  const rows = Math.max(0, ...labels.map((label) => label.row)) + 1;
  const half = Math.max(...contour.map((point) => point.r)) * frame.unit + wall + gap;
  const top = rows * (2 * line.height + line.pad) + line.pad;
  const middle = top + half;
  const height = middle + half + 30;
  return (
    <svg class="section-drawing" viewBox={`0 0 ${frame.width} ${height}`} role="img" aria-label={describe(source, points)}>
      <Section source={source} profile={profile} frame={frame} shades={shades} contour={contour} middle={middle} half={half} />
      <Sight source={source} frame={frame} middle={middle} contour={contour} />
      {wells.map((well, i) => (
        <WellMark key={well.channel} well={well} label={labels[i]!} frame={frame} contour={contour} middle={middle} half={half} />
      ))}
      <Surfaces points={points} frame={frame} middle={middle} half={half} height={height} />
    </svg>
  );
}

interface SectionProps { source: Source; profile: Profile; frame: Frame; shades: Shades | null; contour: Point[]; middle: number; half: number }

function Section({ source, profile, frame, shades, contour, middle, half }: SectionProps) {
  const x = (millimetre: number): number => xOf(frame, millimetre);
  const y = (radius: number, side: number): number => middle - side * radius * frame.unit;
  const end = Math.max(...contour.map((point) => point.x));
  const edge = Math.max(source.cavity.apertureRadiusMillimetre * frame.unit, 2);
  const shade = (millimetre: number): string => {
    const value = curveAt(profile.curve, millimetre);
    return value === null || shades === null ? "var(--wall-unknown)" : `color-mix(in oklab, var(--wall-hot) ${Math.round(shareOf(shades, value) * 100)}%, var(--wall-cold))`;
  };
  const parts = pieces(contour, 3 / frame.unit);
  return (
    <>
      <rect class="case" x={x(0) - 2} y={middle - half} width={x(end) - x(0) + wall + gap} height={2 * half} rx={5} />
      {source.cavity.shape !== "flat-plate" && <path class="hollow" d={hollow(contour, x, (radius, side) => y(radius, side))} />}
      {[1, -1].map((side) =>
        parts.map(([from, to], i) => (
          <line
            key={`${side}-${i}`}
            class="wall"
            x1={x(from.x)}
            y1={y(from.r, side)}
            x2={x(to.x)}
            y2={y(to.r, side)}
            stroke-width={wall}
            stroke-linecap={from.x === to.x ? "butt" : "square"}
            style={{ stroke: shade((from.x + to.x) / 2) }}
          />
        )),
      )}
      {[1, -1].map((side) => (
        <rect key={side} class="plate" x={x(0) - 9} y={side > 0 ? middle - half : middle + edge} width={7} height={half - edge} />
      ))}
      <line class="axis" x1={frame.left - 34} x2={x(end) + 14} y1={middle} y2={middle} />
    </>
  );
}

/** How the source is looked at: the outermost rays through the spot in the aperture plane. A hemispherical view has none to draw. */
function Sight({ source, frame, middle, contour }: { source: Source; frame: Frame; middle: number; contour: Point[] }) {
  const { view } = source;
  if (view.kind === "hemispherical") {
    return null;
  }
  const radius = (x: number): number => sightRadius(view, x) * frame.unit;
  const start = (4 - frame.left) / frame.unit + frame.from;
  const end = contour[contour.length - 1]!.x;
  return (
    <g class="sight">
      {[1, -1].map((side) => (
        <line key={side} x1={xOf(frame, start)} y1={middle - side * radius(start)} x2={xOf(frame, end)} y2={middle - side * radius(end)} />
      ))}
    </g>
  );
}

interface WellMarkProps { well: Marked; label: { x: number; row: number }; frame: Frame; contour: Point[]; middle: number; half: number }

function WellMark({ well, label, frame, contour, middle, half }: WellMarkProps) {
  const x = xOf(frame, well.positionMillimetre!);
  const y = middle - (radiusAt(contour, well.positionMillimetre!) * frame.unit + wall / 2 + 6);
  const end = xOf(frame, Math.max(...contour.map((point) => point.x))) + wall + gap;
  const text = line.pad + label.row * (2 * line.height + line.pad);
  return (
    <g class={well.isReference ? "well reference" : "well"}>
      <line class="bore" x1={x} x2={end} y1={y} y2={y} />
      <path class="leader" d={`M${x} ${y - 5}V${middle - half - 3}L${label.x} ${text + 2 * line.height + 3}`} />
      <circle cx={x} cy={y} r={5} />
      <text x={label.x} y={text + 12} text-anchor="middle">
        <tspan class="sign">{well.sign}</tspan> {wellValue(well)}
      </text>
      <text class="fine" x={label.x} y={text + 12 + line.height} text-anchor="middle">
        {well.isReference ? "reference, " : ""}
        {wellUncertainty(well)}
      </text>
    </g>
  );
}

const wellValue = (well: Marked): string => (well.isSilent || well.celsius === null ? "no value" : celsiusText(well.celsius, well.expandedUncertaintyKelvin));

const wellUncertainty = (well: Marked): string => (well.isSilent || well.celsius === null ? "silent" : well.expandedUncertaintyKelvin === null ? "not traceable" : `U ${uncertaintyKelvin(well.expandedUncertaintyKelvin)}`);

function Surfaces({ points, frame, middle, half, height }: { points: Marked[]; frame: Frame; middle: number; half: number; height: number }) {
  const lip = points.find((point) => point.kind === "lip");
  const outer = points.find((point) => point.kind === "case");
  const text = (point: Marked): string => `${point.sign} ${point.kind === "lip" ? "lip" : "case"} ${point.isSilent || point.celsius === null ? "no value" : celsius(point.celsius, 1)}`;
  return (
    <g class="surfaces">
      {lip !== undefined && (
        <>
          <path class="leader" d={`M${xOf(frame, 0) - 6} ${middle + half - 6}V${height - 18}`} />
          <text x={Math.max(2, xOf(frame, 0) - 50)} y={height - 4}>
            {text(lip)}
          </text>
        </>
      )}
      {outer !== undefined && (
        <>
          <path class="leader" d={`M${frame.width - 60} ${middle + half}V${height - 18}`} />
          <text x={frame.width - 4} y={height - 4} text-anchor="end">
            {text(outer)}
          </text>
        </>
      )}
    </g>
  );
}

function labelsOf(wells: Marked[], frame: Frame): { x: number; row: number }[] {
  // The width of a digit of the drawing's writing, on the wide side.
  const digit = 6.9;
  return stagger(
    wells.map((well) => ({
      x: xOf(frame, well.positionMillimetre!),
      width: digit * Math.max(2 + wellValue(well).length, (well.isReference ? 11 : 0) + wellUncertainty(well).length),
    })),
    [2, frame.width - 2],
  );
}

function hollow(contour: Point[], x: (millimetre: number) => number, y: (radius: number, side: number) => number): string {
  const upper = contour.map((point) => `${x(point.x).toFixed(1)} ${y(point.r, 1).toFixed(1)}`);
  const lower = [...contour].reverse().map((point) => `${x(point.x).toFixed(1)} ${y(point.r, -1).toFixed(1)}`);
  return `M${[...upper, ...lower].join("L")}Z`;
}

function describe(source: Source, points: Marked[]): string {
  const list = points.map((point) => {
    const place = point.kind === "well" && point.positionMillimetre !== null ? ` at ${point.positionMillimetre} mm` : "";
    return `${point.sign}, ${point.name}${place}: ${wellValue(point)}`;
  });
  return `Section of the cavity of ${source.name} along its axis, aperture at the left. ${list.join("; ")}.`;
}
