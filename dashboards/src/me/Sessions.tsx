import { useEffect, useState } from "preact/hooks";
import { endOtherSession, listSessions, type Session } from "../api/access";
import { sentencesOf } from "../api/client";
import { clockTime } from "../format/time";
import { Problems } from "../parts/Problems";
import { announcement, now, site } from "../state";

/** Where the person is signed in. */
export function Sessions() {
  const [sessions, setSessions] = useState<Session[] | null>(null);
  const [problems, setProblems] = useState<string[]>([]);
  const read = async (): Promise<void> => {
    try {
      setSessions((await listSessions()).items);
    } catch (failure) {
      setProblems(sentencesOf(failure, "The sessions could not be read."));
    }
  };
  const end = async (session: Session): Promise<void> => {
    try {
      setProblems([]);
      await endOtherSession(session.id);
      announcement.value = "That session has ended.";
    } catch (failure) {
      setProblems(sentencesOf(failure, "The session was not ended."));
    }
    await read();
  };
  useEffect(() => void read(), []);
  const zone = site.value?.timeZone ?? "UTC";
  return (
    <section class="panel" aria-labelledby="sessions-title" id="sessions">
      <h2 id="sessions-title">Where you are signed in</h2>
      <ul class="rows">
        {sessions?.map((session) => (
          <li key={session.id} class="row">
            <p>
              <strong>{session.address}</strong>
              {session.isCurrent && <span class="tag">this one</span>}
              <br />
              <span class="quiet">{session.agent}</span>
            </p>
            <p class="quiet">
              Since {clockTime(session.startedAt, zone, now.value)}, used {clockTime(session.lastUsedAt, zone, now.value)}
              <br />
              Ends {clockTime(session.expiresAt, zone, now.value)} at the latest
            </p>
            {!session.isCurrent && (
              <button type="button" onClick={() => void end(session)}>
                End<span class="hidden"> the session from {session.address}</span>
              </button>
            )}
          </li>
        ))}
      </ul>
      <Problems sentences={problems} />
    </section>
  );
}
