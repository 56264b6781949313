import { useState } from "preact/hooks";
import { decimalsOfStep } from "../../chart/ticks";
import { timeTicks } from "../../chart/timeTicks";
import { fixed } from "../../format/numbers";
import { clockTime } from "../../format/time";
import { unitText } from "../../format/units";
import { decisionWord } from "../../format/words";
import { now } from "../../state";
import { decisionPath, isOut } from "../Decision";
import { assessedUncertainty, assessedValue, limitPhrase, limitText } from "../quantity";
import { isDecided, limitPieces, marked, nearest, stretches, valueScale, type HistoryPoint } from "./points";

const room = { left: 56, right: 14, top: 20, bottom: 30 };
const noValueRow = 10;

interface HistoryChartProps { label: string; points: HistoryPoint[]; from: number; to: number; zone: string; width: number; height: number; onOpen: (id: string) => void }

/** Values of a criterion over time with their uncertainty, the limit as it was, and each decision by its shape; a point opens its assessment. */
export function HistoryChart({ label, points, from, to, zone, width, height, onOpen }: HistoryChartProps) {
  const [chosen, setChosen] = useState<string | null>(null);
  const index = points.findIndex((point) => point.assessment.id === chosen);
  const selected = points[index];
  const { ticks, cut } = valueScale(points);
  const unit = unitText(points[0]?.assessment.unit ?? "");
  const bottom = height - room.bottom;
  const inner = { width: width - room.left - room.right, height: bottom - room.top };
  const x = (at: number): number => room.left + ((at - from) / (to - from)) * inner.width;
  const y = (value: number): number => room.top + ((ticks.high - Math.min(ticks.high, Math.max(ticks.low, value))) / (ticks.high - ticks.low)) * inner.height;
  const choose = (i: number): void => setChosen(points[Math.min(points.length - 1, Math.max(0, i))]?.assessment.id ?? null);
  const under = (event: MouseEvent): number => {
    const box = (event.currentTarget as SVGElement).getBoundingClientRect();
    const place = ((event.clientX - box.left) / box.width) * width;
    return nearest(points, from + ((place - room.left) / inner.width) * (to - from));
  };
  const onKey = (event: KeyboardEvent): void => {
    const current = index < 0 ? points.length - 1 : index;
    const steps: Record<string, number> = { ArrowLeft: current - 1, ArrowDown: current - 1, ArrowRight: current + 1, ArrowUp: current + 1, PageUp: current - 10, PageDown: current + 10, Home: 0, End: points.length - 1 };
    if (event.key in steps) {
      choose(index < 0 && event.key.startsWith("Arrow") ? current : steps[event.key]!);
    } else if ((event.key === "Enter" || event.key === " ") && selected !== undefined) {
      onOpen(selected.assessment.id);
    } else {
      return;
    }
    event.preventDefault();
  };
  return (
    <>
      <svg
        class="history-chart"
        viewBox={`0 0 ${width} ${height}`}
        tabindex={0}
        role="slider"
        aria-label={`${label}: choose an assessment with the arrow keys, open it with Enter`}
        aria-valuemin={1}
        aria-valuemax={points.length}
        aria-valuenow={index < 0 ? points.length : index + 1}
        aria-valuetext={selected === undefined ? "none chosen" : pointText(selected, zone)}
        onKeyDown={onKey}
        onMouseMove={(event) => choose(under(event))}
        onClick={(event) => {
          const i = under(event);
          const isTouch = (event as unknown as PointerEvent).pointerType === "touch";
          const point = points[i];
          choose(i);
          // A finger first chooses; the button below opens.
          if (point !== undefined && !isTouch) {
            onOpen(point.assessment.id);
          }
        }}
      >
        {ticks.values.map((value) => (
          <g key={value} class="rule">
            <line x1={room.left} x2={width - room.right} y1={y(value)} y2={y(value)} />
            <text x={room.left - 6} y={y(value) + 4} text-anchor="end">
              {fixed(value, decimalsOfStep(ticks.step))}
            </text>
          </g>
        ))}
        {timeTicks(from, to, zone, Math.max(2, Math.floor(inner.width / 70))).map((tick) => (
          <g key={tick.at} class="rule">
            <line x1={x(tick.at)} x2={x(tick.at)} y1={room.top} y2={bottom} />
            <text x={x(tick.at)} y={bottom + 18} text-anchor="middle">
              {tick.text}
            </text>
          </g>
        ))}
        <text class="unit" x={room.left - 6} y={room.top - 8} text-anchor="end">
          {unit === "" ? "" : unit}
        </text>
        {stretches(points).map((part) => (
          <g key={part[0]!.at}>
            <path class="reach" d={band(part, x, y)} />
            <path class="trace" d={part.map((point, i) => `${i === 0 ? "M" : "L"}${x(point.at).toFixed(1)} ${y(point.value!).toFixed(1)}`).join("")} />
          </g>
        ))}
        {limitPieces(points, to).map((piece) => (
          <g key={piece.from} class="limit">
            <line x1={x(piece.from)} x2={x(piece.to)} y1={y(piece.limit)} y2={y(piece.limit)} />
            <text x={Math.min(x(piece.from) + 4, width - room.right - 90)} y={y(piece.limit) - 5}>
              limit {limitText(piece.limit, points[0]!.assessment.unit)}
            </text>
          </g>
        ))}
        <Marks points={points} x={x} y={y} inner={inner.width} bottom={bottom} high={ticks.high} low={ticks.low} />
        {selected !== undefined && (
          <g class="chosen-point">
            <line x1={x(selected.at)} x2={x(selected.at)} y1={room.top} y2={bottom} />
            <circle cx={x(selected.at)} cy={isDecided(selected) ? y(selected.value) : bottom - noValueRow} r={8} />
          </g>
        )}
      </svg>
      <p class="chosen-text">
        {selected === undefined ? (
          <span class="quiet">Choose a point to read it; click or press Enter to open its assessment.</span>
        ) : (
          <>
            <span class="number">{pointText(selected, zone)}</span>{" "}
            <button type="button" onClick={() => onOpen(selected.assessment.id)}>
              Open
            </button>
          </>
        )}
      </p>
      {cut > 0 && (
        <p class="quiet">
          {cut} value{cut === 1 ? "" : "s"} beyond the chart {cut === 1 ? "is" : "are"} drawn at its edge.
        </p>
      )}
    </>
  );
}

interface MarksProps { points: HistoryPoint[]; x: (at: number) => number; y: (value: number) => number; inner: number; bottom: number; high: number; low: number }

function Marks({ points, x, y, inner, bottom, high, low }: MarksProps) {
  const shown = marked(points, inner / 14);
  return (
    <>
      {points.map((point, i) => {
        if (!shown.has(i)) {
          return null;
        }
        const { decision, revision } = point.assessment;
        const isBeyond = isDecided(point) && (point.value > high || point.value < low);
        const size = isOut(decision) ? 12 : 8;
        const top = isDecided(point) ? y(point.value) : bottom - noValueRow;
        return (
          <g key={point.assessment.id} class={`decision-shape ${decision}`} transform={`translate(${(x(point.at) - size / 2).toFixed(1)} ${(top - size / 2).toFixed(1)}) scale(${size / 16})`}>
            <path d={decisionPath[decision]} />
            {isBeyond && <path class="beyond" d={point.value! > high ? "M8 -10l5 7h-10z" : "M8 26l5 -7h-10z"} />}
            {revision > 1 && <path class="revised" d="M-3 -3h22v22h-22z" />}
          </g>
        );
      })}
    </>
  );
}

function band(part: HistoryPoint[], x: (at: number) => number, y: (value: number) => number): string {
  const edge = (point: HistoryPoint, side: number): string => `${x(point.at).toFixed(1)} ${y(point.value! + side * point.reach).toFixed(1)}`;
  return `M${[...part.map((point) => edge(point, 1)), ...[...part].reverse().map((point) => edge(point, -1))].join("L")}Z`;
}

/** One assessment in a line, as it is read out. */
export function pointText({ assessment }: HistoryPoint, zone: string): string {
  const when = clockTime(assessment.windowEnd, zone, now.value);
  const value = assessment.value === null ? "no value" : `${assessedValue(assessment)}, ${assessedUncertainty(assessment)}, ${limitPhrase(assessment)}`;
  return `${when}: ${decisionWord[assessment.decision]}, ${value}${assessment.revision > 1 ? `, revision ${assessment.revision}` : ""}`;
}
