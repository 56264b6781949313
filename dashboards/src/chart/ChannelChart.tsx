import { signal } from "@preact/signals";
import type { ComponentChildren } from "preact";
import { useEffect, useRef, useState } from "preact/hooks";
import "uplot/dist/uPlot.min.css";
import { readReadings, readingsAddress } from "../api/client";
import type { Channel, Readings, Source } from "../api/types";
import { celsius, fixed } from "../format/numbers";
import { clockTime, zoneName } from "../format/time";
import { unitText } from "../format/units";
import { typeset } from "../format/words";
import { link, now, site, sources } from "../state";
import { plot, type Level } from "./plot";
import { columnsOf, withSetPoint, type Columns } from "./series";

export const ranges = [
  { key: "1h", label: "1 hour", seconds: 3_600 },
  { key: "8h", label: "8 hours", seconds: 28_800 },
  { key: "1d", label: "1 day", seconds: 86_400 },
  { key: "7d", label: "7 days", seconds: 604_800 },
  { key: "30d", label: "30 days", seconds: 2_592_000 },
] as const;

/** What the chart shows; null for the first there is. */
export const charted = signal<{ source: string; channel: string | null } | null>(null);
export const rangeKey = signal<(typeof ranges)[number]["key"]>("1h");

interface Shown { columns: Columns; from: number; to: number; key: string }

/** One channel of one source over a stretch of time. */
export function ChannelChart() {
  const source = sources.value.find((candidate) => candidate.id === charted.value?.source) ?? sources.value[0];
  const channel =
    source?.channels.find((candidate) => candidate.id === charted.value?.channel) ??
    source?.channels.find((candidate) => candidate.isReference) ??
    source?.channels[0];
  return (
    <section id="chart" aria-labelledby="chart-title" tabIndex={-1} class="panel chart">
      <h2 id="chart-title">Chart</h2>
      {source === undefined || channel === undefined ? (
        <p>There is no channel to show yet.</p>
      ) : (
        <Chart source={source} channel={channel} onChannel={(id) => (charted.value = { source: source.id, channel: id })}>
          <label>
            Source
            <select value={source.id} onChange={(event) => (charted.value = { source: event.currentTarget.value, channel: null })}>
              {sources.value.map((candidate) => (
                <option key={candidate.id} value={candidate.id}>
                  {typeset(candidate.name)}
                </option>
              ))}
            </select>
          </label>
        </Chart>
      )}
    </section>
  );
}

interface ChartProps { source: Source; channel: Channel; onChannel: (id: string) => void; children?: ComponentChildren }

/** One channel of a source with the choice of channel and stretch of time; thermometers with the set point as it was. */
export function Chart({ source, channel, onChannel, children }: ChartProps) {
  const range = ranges.find((candidate) => candidate.key === rangeKey.value)!;
  const shown = useReadings(source, channel, range.seconds);
  const unit = shown?.columns.isTemperature === true ? "°C" : unitText(channel.unit);
  const levels = levelsOf(channel);
  const zone = site.value?.timeZone ?? "UTC";
  const window = shown === null ? null : { from: new Date(shown.from * 1000), to: new Date(shown.to * 1000) };
  return (
    <>
      <div class="controls">
        {children}
        <label>
          Channel
          <select value={channel.id} onChange={(event) => onChannel(event.currentTarget.value)}>
            {source.channels.map((candidate) => (
              <option key={candidate.id} value={candidate.id}>
                {candidate.name}
                {candidate.isReference ? " (reference)" : ""}
              </option>
            ))}
          </select>
        </label>
        <div class="ranges" role="group" aria-label="Stretch of time">
          {ranges.map((candidate) => (
            <button key={candidate.key} type="button" aria-pressed={candidate.key === range.key} onClick={() => (rangeKey.value = candidate.key)}>
              {candidate.label}
            </button>
          ))}
        </div>
      </div>
      <Drawing shown={shown} unit={unit} name={channel.name} zone={zone} levels={levels} />
      <p class="quiet chart-note">
        Times in {zoneName(zone, now.value)}. {summary(shown, unit, zone)} {setPointText(shown, unit)}{" "}
        {levels.map((level) => `${level.label}.`).join(" ")}{" "}
        {window !== null && <a href={readingsAddress(source.id, channel.id, window.from, window.to)}>Download as CSV</a>}
      </p>
    </>
  );
}

/** Reads the readings of the stretch that ends now, and again as time goes on; the last good answer stays while the next is under way. */
function useReadings(source: Source, channel: Channel, seconds: number): Shown | null {
  const key = `${source.id}/${channel.id}/${seconds}`;
  const [shown, setShown] = useState<Shown | null>(null);
  const live = link.value === "live";
  useEffect(() => {
    const abort = new AbortController();
    let timer: number | undefined;
    const read = async (): Promise<void> => {
      const to = Math.ceil(now.value / 1000);
      try {
        const read = (id: string): Promise<Readings> => readReadings(source.id, id, new Date((to - seconds) * 1000), new Date(to * 1000), abort.signal);
        const asked = setPointFor(source, channel);
        const [readings, setPoints] = await Promise.all([read(channel.id), asked === undefined ? null : read(asked.id)]);
        const columns = columnsOf(readings, channel.intervalSeconds);
        setShown({ columns: setPoints === null ? columns : withSetPoint(columns, setPoints), from: to - seconds, to, key });
      } catch {
        // The link's own banner says that the service does not answer; the next round tries again.
      }
      if (!abort.signal.aborted) {
        timer = window.setTimeout(() => void read(), Math.max(5_000, seconds));
      }
    };
    if (live) {
      void read();
    }
    return () => {
      abort.abort();
      window.clearTimeout(timer);
    };
  }, [key, live]);
  return shown?.key === key ? shown : null;
}

function Drawing({ shown, unit, name, zone, levels }: { shown: Shown | null; unit: string; name: string; zone: string; levels: Level[] }) {
  const target = useRef<HTMLDivElement>(null);
  const [, setTurn] = useState(0);
  const levelKey = levels.map((level) => level.label).join();
  useEffect(() => {
    // Another width or another colour scheme: draw anew.
    const again = (): void => setTurn((turn) => turn + 1);
    const scheme = matchMedia("(prefers-color-scheme: dark)");
    const sizes = new ResizeObserver(again);
    sizes.observe(target.current!.parentElement!);
    scheme.addEventListener("change", again);
    return () => {
      sizes.disconnect();
      scheme.removeEventListener("change", again);
    };
  }, []);
  const width = target.current?.parentElement?.clientWidth ?? 0;
  const dark = matchMedia("(prefers-color-scheme: dark)").matches;
  useEffect(() => {
    if (target.current === null || shown === null) {
      return;
    }
    const room = target.current.parentElement!.clientWidth;
    const chart = plot(target.current, { columns: shown.columns, from: shown.from, to: shown.to, unit, name, zone, levels, width: room, height: room < 500 ? 240 : 320 });
    return () => chart.destroy();
  }, [shown, unit, name, zone, levelKey, width, dark]);
  return (
    <div class="drawing">
      {shown === null && <p class="quiet loading">{link.value === "live" ? "Reading…" : "Waiting for the service…"}</p>}
      <div ref={target} />
    </div>
  );
}

/** The channel of the set point that a thermometer of the source is to be compared with. */
const setPointFor = (source: Source, channel: Channel): Channel | undefined =>
  ["well-thermometer", "comparator-temperature"].includes(channel.quantity) ? source.channels.find((candidate) => candidate.quantity === "set-point") : undefined;

/** What lies across the chart: the limit of a touchable surface. */
function levelsOf(channel: Channel): Level[] {
  const levels: Level[] = [];
  if (channel.hotLimitCelsius !== null) {
    levels.push({ value: channel.hotLimitCelsius, label: `Alert above ${celsius(channel.hotLimitCelsius, 0)}`, isLimit: true });
  }
  return levels;
}

/** The set point over the stretch, in words: it is drawn only where it lies near the values. */
function setPointText(shown: Shown | null, unit: string): string {
  const values = [...new Set((shown?.columns.setPoint ?? []).filter((value): value is number => value !== null))];
  const text = (value: number): string => `${fixed(value, 2)} ${unit}`;
  return values.length === 0 ? "" : values.length === 1 ? `Set point ${text(values[0]!)} throughout.` : `Set point ${text(Math.min(...values))} to ${text(Math.max(...values))}.`;
}

function summary(shown: Shown | null, unit: string, zone: string): string {
  const known = shown?.columns.value.filter((value): value is number => value !== null) ?? [];
  if (shown === null) {
    return "";
  }
  if (known.length === 0) {
    return "There are no readings in this stretch.";
  }
  const low = shown.columns.low.reduce<number>((least, value) => (value === null ? least : Math.min(least, value)), Infinity);
  const high = shown.columns.high.reduce<number>((most, value) => (value === null ? most : Math.max(most, value)), -Infinity);
  const spread = high - low;
  const decimals = spread < 1 ? 3 : spread < 100 ? 2 : 0;
  const last = shown.columns.time[shown.columns.time.length - 1]!;
  return `Newest ${fixed(known[known.length - 1], decimals)} ${unit} at ${clockTime(last * 1000, zone, now.value)}, lowest ${fixed(low, decimals)}, highest ${fixed(high, decimals)} ${unit}.`;
}
