import type { ReadinessState } from "../api/types";

// Shapes of our own: each state has its own outline, so that none is told by colour alone.
const paths = {
  ready: "M8 1.5a6.5 6.5 0 1 0 0 13a6.5 6.5 0 1 0 0-13M4.8 8.2l2.3 2.3l4.2-4.6",
  waiting: "M8 1.5a6.5 6.5 0 1 0 0 13a6.5 6.5 0 1 0 0-13M8 4.5V8l2.6 1.8",
  off: "M8 1.5a6.5 6.5 0 1 0 0 13a6.5 6.5 0 1 0 0-13M4.8 8h6.4",
  stop: "M5.2 1.5h5.6l3.7 3.7v5.6l-3.7 3.7H5.2l-3.7-3.7V5.2zM5.4 5.4l5.2 5.2M10.6 5.4l-5.2 5.2",
  unknown: "M8 1l7 7l-7 7l-7-7zM6.3 6.4a1.8 1.8 0 1 1 2.4 1.7c-.5.2-.7.5-.7 1.1M8 11v.4",
  hazard: "M8 1.4L15 14.2H1zM8 6v4M8 11.8v.5",
  deviation: "M2 2h12v12H2zM8 4.6v4.2M8 11v.5",
} as const;

export type IconName = keyof typeof paths;

/** The shape of each state of readiness. */
export const readinessIcon: Record<ReadinessState, IconName> = {
  ready: "ready",
  heating: "waiting",
  cooling: "waiting",
  settling: "waiting",
  off: "off",
  "not-fit": "stop",
  unknown: "unknown",
};

export function Icon({ name, size = 20 }: { name: IconName; size?: number }) {
  return (
    <svg class="icon" width={size} height={size} viewBox="0 0 16 16" aria-hidden="true" focusable="false">
      <path d={paths[name]} fill="none" stroke="currentColor" stroke-width="1.6" stroke-linecap="round" stroke-linejoin="round" />
    </svg>
  );
}
