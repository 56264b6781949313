import { decimalsOfStep, ticksWithin } from "../../chart/ticks";
import { fixed } from "../../format/numbers";
import { differenceText, uncertaintyKelvin } from "../../format/uncertainty";
import type { Source } from "../../api/types";
import type { Profile } from "../types";
import { xOf, type Frame } from "./frame";
import { differenceOf, markedPoints, type Marked } from "./marks";
import { shadesOf } from "./shades";

const room = { top: 26, bottom: 40 };

interface ProfileChartProps { source: Source; profile: Profile; frame: Frame; height: number }

/** The axial profile: difference from the reference against the place on the axis, with the uncertainty of each well. */
export function ProfileChart({ source, profile, frame, height }: ProfileChartProps) {
  const scale = shadesOf(profile, true);
  if (scale === null) {
    return null;
  }
  const { ticks, perKelvin, unit, reference } = scale;
  const bottom = height - room.bottom;
  const y = (value: number): number => room.top + ((ticks.high - value) / (ticks.high - ticks.low)) * (bottom - room.top);
  const places = ticksWithin(frame.from, frame.to, Math.max(3, Math.floor(frame.width / 90)));
  const curve = profile.curve.map((point, i) => `${i === 0 ? "M" : "L"}${xOf(frame, point.positionMillimetre).toFixed(1)} ${y((point.celsius - reference) * perKelvin).toFixed(1)}`).join("");
  const points = markedPoints(profile, source).filter((point) => point.kind !== "case" && point.positionMillimetre !== null && point.celsius !== null && !point.isSilent);
  return (
    <svg class="profile-chart" viewBox={`0 0 ${frame.width} ${height}`} role="img" aria-label={describe(points, profile)}>
      <clipPath id="profile-clip">
        <rect x={frame.left} y={room.top} width={frame.width - frame.left - frame.right} height={bottom - room.top} />
      </clipPath>
      {ticks.values.map((value) => (
        <g key={value} class={value === 0 ? "rule zero" : "rule"}>
          <line x1={frame.left} x2={frame.width - frame.right} y1={y(value)} y2={y(value)} />
          <text x={frame.left - 6} y={y(value) + 4} text-anchor="end">
            {(value > 0 ? "+" : "") + fixed(value, decimalsOfStep(ticks.step))}
          </text>
        </g>
      ))}
      {places.values.map((value) => (
        <g key={value} class={value === 0 ? "rule aperture" : "rule"}>
          <line x1={xOf(frame, value)} x2={xOf(frame, value)} y1={room.top} y2={bottom} />
          <text x={xOf(frame, value)} y={bottom + 15} text-anchor="middle">
            {fixed(value, decimalsOfStep(places.step))}
          </text>
        </g>
      ))}
      <text class="unit" x={frame.left - 6} y={12} text-anchor="end">
        {unit}
      </text>
      <text class="title" x={frame.width - frame.right} y={height - 6} text-anchor="end">
        mm from the aperture plane
      </text>
      <path class="curve" d={curve} clip-path="url(#profile-clip)" />
      {points.map((point) => (
        <PointMark key={point.channel} point={point} x={xOf(frame, point.positionMillimetre!)} y={y} value={(point.celsius! - reference) * perKelvin} reach={point.kind === "well" ? (point.expandedUncertaintyKelvin ?? 0) * perKelvin : 0} low={ticks.low} high={ticks.high} />
      ))}
    </svg>
  );
}

interface PointMarkProps { point: Marked; x: number; y: (value: number) => number; value: number; reach: number; low: number; high: number }

function PointMark({ point, x, y, value, reach, low, high }: PointMarkProps) {
  if (value < low || value > high) {
    const edge = value < low ? y(low) : y(high);
    const way = value < low ? 1 : -1;
    return (
      <g class="beyond">
        <path d={`M${x - 5} ${edge - 8 * way}H${x + 5}L${x} ${edge - way}Z`} />
        <text x={x + 9} y={edge - 4 * way + 4}>
          {point.sign}
        </text>
      </g>
    );
  }
  return (
    <g class={point.isReference ? "point reference" : "point"}>
      {reach > 0 && <path class="bar" d={`M${x} ${y(value - reach)}V${y(value + reach)}M${x - 5} ${y(value - reach)}h10M${x - 5} ${y(value + reach)}h10`} />}
      {point.kind === "lip" ? <rect x={x - 4} y={y(value) - 4} width={8} height={8} /> : <circle cx={x} cy={y(value)} r={4.5} />}
      <text x={x + 9} y={y(value) - 6}>
        {point.sign}
      </text>
    </g>
  );
}

function describe(points: Marked[], profile: Profile): string {
  const list = points.map((point) => {
    const difference = differenceOf(point, profile);
    const far = point.isReference ? "the reference" : differenceText(difference, point.expandedUncertaintyKelvin);
    return `${point.sign} at ${point.positionMillimetre} mm: ${far}${point.expandedUncertaintyKelvin === null ? "" : `, U ${uncertaintyKelvin(point.expandedUncertaintyKelvin)}`}`;
  });
  return `Axial profile, difference from the reference. ${list.join("; ")}.`;
}
