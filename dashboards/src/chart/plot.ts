import uPlot from "uplot";
import { clockTime } from "../format/time";
import { fixed } from "../format/numbers";
import type { Columns } from "./series";

/** A level drawn across the chart. */
export interface Level { value: number; label: string; isLimit: boolean }

export interface PlotInput {
  columns: Columns;
  from: number;
  to: number;
  unit: string;
  name: string;
  zone: string;
  levels: Level[];
  width: number;
  height: number;
}

const colour = (name: string): string => getComputedStyle(document.documentElement).getPropertyValue(name).trim();

/** Draws a chart into an element, in the colours of the page. */
export function plot(target: HTMLElement, input: PlotInput): uPlot {
  const { columns, zone } = input;
  const decimals = decimalsOf(columns);
  const axis: uPlot.Axis = { stroke: colour("--text-quiet"), grid: { stroke: colour("--line"), width: 1 }, ticks: { stroke: colour("--line"), width: 1 }, font: "12px system-ui, sans-serif" };
  const number = (value: number | null): string => (value == null ? "–" : `${fixed(value, decimals)} ${input.unit}`);
  return new uPlot(
    {
      width: input.width,
      height: input.height,
      tzDate: (seconds) => uPlot.tzDate(new Date(seconds * 1000), zone),
      scales: { x: { min: input.from, max: input.to }, y: { range: () => range(...extremes(columns), [...input.levels.map((level) => level.value), ...setPoints(columns)]) } },
      cursor: { drag: { x: false, y: false } },
      legend: { live: true },
      axes: [
        { ...axis, values: (chart, splits, _, __, step) => splits.map((at) => tick(at, step, chart, zone)), space: 70 },
        { ...axis, size: 68, values: (_, splits) => splits.map((value) => fixed(value, tickDecimals(splits))) },
      ],
      series: [
        { label: "Time", value: (_, at) => (at === null ? "–" : clockTime(at * 1000, zone, 0, true)) },
        { label: columns.isReduced ? `${input.name}, mean` : input.name, stroke: colour("--trace"), width: 1.5, value: (_, value) => number(value) },
        ...(columns.isReduced
          ? [
              { label: "lowest", stroke: "transparent", points: { show: false }, value: (_: uPlot, value: number | null) => number(value) },
              { label: "highest", stroke: "transparent", points: { show: false }, value: (_: uPlot, value: number | null) => number(value) },
            ]
          : []),
        ...(columns.setPoint === undefined
          ? []
          : [
              {
                label: "Set point",
                stroke: colour("--text-quiet"),
                width: 1.5,
                dash: [6, 4],
                points: { show: false },
                paths: uPlot.paths.stepped!({ align: 1 }),
                value: (_: uPlot, value: number | null) => (value == null ? "–" : `${fixed(value, 2)} ${input.unit}`),
              },
            ]),
      ],
      bands: columns.isReduced ? [{ series: [3, 2], fill: colour("--trace-band") }] : [],
      hooks: { drawClear: [(chart) => drawGaps(chart, columns.gaps)], draw: [(chart) => drawLevels(chart, input.levels)] },
    },
    [columns.time, columns.value, ...(columns.isReduced ? [columns.low, columns.high] : []), ...(columns.setPoint === undefined ? [] : [columns.setPoint])] as uPlot.AlignedData,
    target,
  );
}

/** The scale shows the values; a level or set point is drawn in where it lies near them, and mentioned below the chart where not. */
function range(low: number | null, high: number | null, levels: number[]): [number, number] {
  if (low === null || high === null) {
    return levels.length === 0 ? [0, 1] : [Math.min(...levels) - 1, Math.max(...levels) + 1];
  }
  const spread = Math.max(high - low, 1e-3);
  const near = levels.filter((value) => value > low - 4 * spread && value < high + 4 * spread);
  const bottom = Math.min(low, ...near);
  const top = Math.max(high, ...near);
  const margin = (top - bottom) * 0.08 || 0.5;
  return [bottom - margin, top + margin];
}

/** Lowest and highest of what was measured, the set point apart. */
function extremes(columns: Columns): [number | null, number | null] {
  const low = columns.low.reduce<number | null>((least, value) => (value === null || (least !== null && least <= value) ? least : value), null);
  const high = columns.high.reduce<number | null>((most, value) => (value === null || (most !== null && most >= value) ? most : value), null);
  return [low, high];
}

const setPoints = (columns: Columns): number[] => [...new Set((columns.setPoint ?? []).filter((value): value is number => value !== null))];

function tick(at: number, step: number, chart: uPlot, zone: string): string {
  const isLong = (chart.scales["x"]!.max ?? 0) - (chart.scales["x"]!.min ?? 0) > 86_400 * 1.5;
  const date = new Date(at * 1000);
  const options: Intl.DateTimeFormatOptions =
    step >= 86_400 || (isLong && step >= 43_200)
      ? { day: "numeric", month: "short" }
      : isLong
        ? { day: "numeric", month: "short", hour: "2-digit", minute: "2-digit" }
        : { hour: "2-digit", minute: "2-digit", ...(step < 60 ? { second: "2-digit" } : {}) };
  return new Intl.DateTimeFormat("en-GB", { timeZone: zone, hourCycle: "h23", ...options }).format(date);
}

function tickDecimals(splits: number[]): number {
  const step = splits.length > 1 ? Math.abs(splits[1]! - splits[0]!) : 1;
  return Math.max(0, Math.min(4, Math.ceil(-Math.log10(step) - 1e-9)));
}

function decimalsOf(columns: Columns): number {
  const known = columns.value.filter((value): value is number => value !== null);
  if (known.length === 0) {
    return 2;
  }
  const spread = known.reduce((most, value) => Math.max(most, value), -Infinity) - known.reduce((least, value) => Math.min(least, value), Infinity);
  return spread < 0.5 ? 4 : spread < 50 ? 3 : 1;
}

function drawGaps(chart: uPlot, gaps: [number, number][]): void {
  const { ctx, bbox } = chart;
  ctx.save();
  ctx.fillStyle = colour("--gap");
  ctx.strokeStyle = colour("--line");
  for (const [from, to] of gaps) {
    const left = Math.max(bbox.left, chart.valToPos(from, "x", true));
    const right = Math.min(bbox.left + bbox.width, chart.valToPos(to, "x", true));
    if (right - left < 1) {
      continue;
    }
    ctx.fillRect(left, bbox.top, right - left, bbox.height);
    if (right - left > 80 * devicePixelRatio) {
      ctx.fillStyle = colour("--text-quiet");
      ctx.font = `${12 * devicePixelRatio}px system-ui, sans-serif`;
      ctx.textAlign = "center";
      ctx.fillText("no readings", (left + right) / 2, bbox.top + 16 * devicePixelRatio);
      ctx.fillStyle = colour("--gap");
    }
  }
  ctx.restore();
}

function drawLevels(chart: uPlot, levels: Level[]): void {
  const { ctx, bbox } = chart;
  const { min, max } = chart.scales["y"]!;
  ctx.save();
  ctx.font = `${12 * devicePixelRatio}px system-ui, sans-serif`;
  for (const level of levels) {
    if (min == null || max == null || level.value < min || level.value > max) {
      continue;
    }
    const y = chart.valToPos(level.value, "y", true);
    ctx.strokeStyle = ctx.fillStyle = colour(level.isLimit ? "--hazard" : "--text-quiet");
    ctx.lineWidth = 1.5 * devicePixelRatio;
    ctx.setLineDash([6 * devicePixelRatio, 4 * devicePixelRatio]);
    ctx.beginPath();
    ctx.moveTo(bbox.left, y);
    ctx.lineTo(bbox.left + bbox.width, y);
    ctx.stroke();
    label(ctx, level.label, bbox.left + 6 * devicePixelRatio, y);
  }
  ctx.restore();
}

/** A label on the line, on the page's own ground so that the trace does not run through it. */
function label(ctx: CanvasRenderingContext2D, text: string, left: number, y: number): void {
  const ink = ctx.fillStyle;
  const pad = 4 * devicePixelRatio;
  const high = 16 * devicePixelRatio;
  ctx.fillStyle = colour("--panel");
  ctx.fillRect(left, y - high / 2, ctx.measureText(text).width + 2 * pad, high);
  ctx.fillStyle = ink;
  ctx.textAlign = "left";
  ctx.textBaseline = "middle";
  ctx.fillText(text, left + pad, y);
}
