import { fixed } from "../../format/numbers";
import { useWidth } from "../width";
import type { CoatingInference } from "./types";

const height = 58;
const room = { left: 14, right: 14 };

/** The interval of emissivities that explain what a comparator shows, over those thought possible, with the stated one. */
export function CoatingDrawing({ coating }: { coating: CoatingInference }) {
  const [element, width] = useWidth<HTMLDivElement>();
  const from = coating.lowestPossible;
  const x = (emissivity: number): number => room.left + ((Math.min(1, Math.max(from, emissivity)) - from) / (1 - from)) * (width - room.left - room.right);
  const { stated } = coating;
  const reach = stated.expandedUncertainty ?? 0;
  return (
    <div ref={element}>
      <svg class="history-chart drift-chart" viewBox={`0 0 ${width} ${height}`} role="img" aria-label={coating.explanation}>
        <g class="rule">
          <line x1={x(from)} x2={x(1)} y1={24} y2={24} />
          {[0.5, 0.6, 0.7, 0.8, 0.9, 1]
            .filter((value) => value >= from)
            .map((value) => (
              <g key={value}>
                <line x1={x(value)} x2={x(value)} y1={18} y2={30} />
                <text x={x(value)} y={50} text-anchor="middle">
                  {fixed(value, 1)}
                </text>
              </g>
            ))}
        </g>
        {coating.lower !== null && coating.upper !== null && <rect class="reach" x={x(coating.lower)} y={14} width={Math.max(2, x(coating.upper) - x(coating.lower))} height={20} />}
        <path class="trace" d={`M${x(stated.value - reach)} 24H${x(stated.value + reach)}`} />
        <circle class="day" cx={x(stated.value)} cy={24} r={4.5} />
      </svg>
      <p class="quiet">Shaded: emissivities that explain it. Circle with bar: stated, with U (k = 2).</p>
    </div>
  );
}
