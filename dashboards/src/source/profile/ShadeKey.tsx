import { decimalsOfStep } from "../../chart/ticks";
import { fixed } from "../../format/numbers";
import type { Shades } from "./shades";

const box = { width: 300, left: 22, right: 22, height: 44, bar: 12, top: 4 };
const steps = 40;

/** How the shades of the wall are to be read: a scale with numbers and their unit. */
export function ShadeKey({ shades }: { shades: Shades }) {
  const { ticks, unit } = shades;
  const inner = box.width - box.left - box.right;
  const x = (value: number): number => box.left + ((value - ticks.low) / (ticks.high - ticks.low)) * inner;
  return (
    <figure class="shade-key">
      <svg viewBox={`0 0 ${box.width} ${box.height}`} role="img" aria-label={`The wall is shaded from ${fixed(ticks.low, 0)} to ${fixed(ticks.high, 0)} ${unit} around the reference.`}>
        {Array.from({ length: steps }, (_, i) => (
          <rect
            key={i}
            x={box.left + (i * inner) / steps}
            y={box.top}
            width={inner / steps + 0.6}
            height={box.bar}
            style={{ fill: `color-mix(in oklab, var(--wall-hot) ${Math.round(((i + 0.5) / steps) * 100)}%, var(--wall-cold))` }}
          />
        ))}
        <rect class="frame" x={box.left} y={box.top} width={inner} height={box.bar} />
        {ticks.values.map((value) => (
          <g key={value}>
            <line x1={x(value)} x2={x(value)} y1={box.top} y2={box.top + box.bar + 4} />
            <text x={x(value)} y={box.top + box.bar + 18} text-anchor="middle">
              {(value > 0 ? "+" : "") + fixed(value, decimalsOfStep(ticks.step))}
            </text>
          </g>
        ))}
      </svg>
      <figcaption>Wall temperature from the reference, {unit}</figcaption>
    </figure>
  );
}
