import { useEffect, useState } from "preact/hooks";
import { clearFault, injectFault, listFaults, Refusal } from "../api/client";
import type { Faults } from "../api/types";
import { clockTime } from "../format/time";
import { fixed } from "../format/numbers";
import { typeset, words } from "../format/words";
import { shortName } from "../hazards/board";
import { link, now, site, sources } from "../state";

/** Demo only: break the simulated laboratory, and mend it. */
export function FaultPanel() {
  const [faults, setFaults] = useState<Faults | null>(null);
  const [kind, setKind] = useState("");
  const [sourceId, setSource] = useState("");
  const [channel, setChannel] = useState("");
  const [size, setSize] = useState("");
  const [problems, setProblems] = useState<string[]>([]);
  const live = link.value === "live";
  useEffect(() => {
    if (!live) {
      return;
    }
    const read = (): void => void listFaults().then(setFaults, () => undefined);
    read();
    const timer = window.setInterval(read, 10_000);
    return () => window.clearInterval(timer);
  }, [live]);

  const chosen = faults?.kinds.find((candidate) => candidate.kind === kind) ?? faults?.kinds[0];
  const source = sources.value.find((candidate) => candidate.id === sourceId) ?? sources.value[0];
  const act = async (work: Promise<Faults>): Promise<void> => {
    try {
      setFaults(await work);
      setProblems([]);
    } catch (failure) {
      setProblems(failure instanceof Refusal ? failure.sentences : ["That failed."]);
    }
  };
  if (faults === null || chosen === undefined || source === undefined) {
    return null;
  }
  const channelId = source.channels.some((candidate) => candidate.id === channel) ? channel : (source.channels[0]?.id ?? "");
  const zone = site.value?.timeZone ?? "UTC";
  return (
    <section class="panel" aria-labelledby="faults-title" id="faults">
      <h2 id="faults-title">Break something (demo)</h2>
      <p class="quiet">This laboratory is invented and simulated. Inject a fault and see what the service makes of it.</p>
      <form
        class="controls"
        onSubmit={(event) => {
          event.preventDefault();
          void act(injectFault(chosen.kind, source.id, chosen.needsChannel ? channelId : null, size === "" ? null : Number(size)));
        }}
      >
        <label>
          Source
          <select value={source.id} onChange={(event) => setSource(event.currentTarget.value)}>
            {sources.value.map((candidate) => (
              <option key={candidate.id} value={candidate.id}>
                {typeset(candidate.name)}
              </option>
            ))}
          </select>
        </label>
        <label>
          Fault
          <select value={chosen.kind} onChange={(event) => setKind(event.currentTarget.value)}>
            {faults.kinds.map((candidate) => (
              <option key={candidate.kind} value={candidate.kind}>
                {words(candidate.kind)}
              </option>
            ))}
          </select>
        </label>
        {chosen.needsChannel && (
          <label>
            Channel
            <select value={channelId} onChange={(event) => setChannel(event.currentTarget.value)}>
              {source.channels.map((candidate) => (
                <option key={candidate.id} value={candidate.id}>
                  {typeset(candidate.name)}
                </option>
              ))}
            </select>
          </label>
        )}
        {chosen.minimum < chosen.maximum && (
          <label>
            Size{chosen.unit === "1" ? "" : ` (${chosen.unit})`}
            <input
              type="number"
              step="any"
              min={chosen.minimum}
              max={chosen.maximum}
              placeholder={String(chosen.defaultSize)}
              value={size}
              onInput={(event) => setSize(event.currentTarget.value)}
            />
          </label>
        )}
        <button type="submit">Inject</button>
      </form>
      <p class="quiet">{chosen.description}</p>
      <div role="alert">
        {problems.map((problem) => (
          <p key={problem} class="abnormal">
            {problem}
          </p>
        ))}
      </div>
      {faults.active.length === 0 ? (
        <p>No fault is in force.</p>
      ) : (
        <ul class="fault-list">
          {faults.active.map((fault) => (
            <li key={fault.id}>
              {words(fault.kind)}, {shortName(sources.value.find((candidate) => candidate.id === fault.source)?.name ?? fault.source)}
              {fault.channel !== null && `, ${fault.channel}`}
              {fault.size !== null && `, ${fixed(fault.size, 2)}`} · since {clockTime(fault.since, zone, now.value)}
              {fault.isScheduled ? (
                <span class="quiet"> · ends by itself</span>
              ) : (
                <button type="button" onClick={() => void act(clearFault(fault.id))}>
                  Repair<span class="hidden"> {words(fault.kind)}, {fault.channel ?? fault.source}</span>
                </button>
              )}
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}
