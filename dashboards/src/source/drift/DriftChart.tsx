import { decimalsOfStep } from "../../chart/ticks";
import { timeTicks } from "../../chart/timeTicks";
import { fixed, significant } from "../../format/numbers";
import { unitText } from "../../format/units";
import { limitsOf, scaleOf } from "./series";
import type { Forecast } from "./types";

const room = { left: 64, right: 14, top: 22, bottom: 30 };

interface DriftChartProps { label: string; forecast: Forecast; zone: string; width: number; height: number }

/** Day means, the line through them carried on by a quarter of its length, and the limit where it is near. */
export function DriftChart({ label, forecast, zone, width, height }: DriftChartProps) {
  const { days, line } = forecast;
  const seconds = days.map((day) => Date.parse(day.at) / 1000);
  const first = seconds[0]!;
  const last = seconds[seconds.length - 1]!;
  const from = first - 43_200;
  const to = last + Math.max(43_200, (last - first) * 0.25);
  const ticks = scaleOf(forecast);
  const bottom = height - room.bottom;
  const x = (at: number): number => room.left + ((at - from) / (to - from)) * (width - room.left - room.right);
  const y = (value: number): number => room.top + ((ticks.high - value) / (ticks.high - ticks.low)) * (bottom - room.top);
  const inside = (value: number): boolean => value >= ticks.low && value <= ticks.high;
  const slope = line === null || last === first ? 0 : (line[1] - line[0]) / (last - first);
  return (
    <svg class="history-chart drift-chart" viewBox={`0 0 ${width} ${height}`} role="img" aria-label={`${label}. ${forecast.explanation}`}>
      <clipPath id="drift-clip">
        <rect x={room.left} y={room.top} width={width - room.left - room.right} height={bottom - room.top} />
      </clipPath>
      {ticks.values.map((value) => (
        <g key={value} class={value === 0 ? "rule zero" : "rule"}>
          <line x1={room.left} x2={width - room.right} y1={y(value)} y2={y(value)} />
          <text x={room.left - 6} y={y(value) + 4} text-anchor="end">
            {fixed(value, decimalsOfStep(ticks.step))}
          </text>
        </g>
      ))}
      {timeTicks(from, to, zone, Math.max(2, Math.floor((width - room.left) / 80))).map((tick) => (
        <g key={tick.at} class="rule">
          <line x1={x(tick.at)} x2={x(tick.at)} y1={room.top} y2={bottom} />
          <text x={x(tick.at)} y={bottom + 18} text-anchor="middle">
            {tick.text}
          </text>
        </g>
      ))}
      <text class="unit" x={room.left - 6} y={room.top - 9} text-anchor="end">
        {unitText(forecast.unit)}
      </text>
      {limitsOf(forecast)
        .filter(inside)
        .map((value) => (
          <g key={value} class="limit">
            <line x1={room.left} x2={width - room.right} y1={y(value)} y2={y(value)} />
            <text x={room.left + 6} y={y(value) - 5}>
              limit {significant(value)} {unitText(forecast.unit)}
            </text>
          </g>
        ))}
      {line !== null && (
        <g clip-path="url(#drift-clip)">
          <path class="trace" d={`M${x(first)} ${y(line[0])}L${x(last)} ${y(line[1])}`} />
          <path class="trace ahead" d={`M${x(last)} ${y(line[1])}L${x(to)} ${y(line[1] + slope * (to - last))}`} />
        </g>
      )}
      {days.map((day, i) => (
        <circle key={day.at} class="day" cx={x(seconds[i]!)} cy={y(day.value)} r={3.4} />
      ))}
    </svg>
  );
}
