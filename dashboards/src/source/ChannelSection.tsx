import { useState } from "preact/hooks";
import type { Source } from "../api/types";
import { Chart } from "../chart/ChannelChart";

/** The channels of one source over time. */
export function ChannelSection({ source }: { source: Source }) {
  const [chosen, setChosen] = useState<string | null>(null);
  const channel = source.channels.find((candidate) => candidate.id === chosen) ?? source.channels.find((candidate) => candidate.isReference) ?? source.channels[0];
  return (
    <section id="chart" tabIndex={-1} class="panel chart" aria-labelledby="chart-title">
      <h2 id="chart-title">Channels over time</h2>
      {channel === undefined ? <p>This source has no channel yet.</p> : <Chart source={source} channel={channel} onChannel={setChosen} />}
    </section>
  );
}
