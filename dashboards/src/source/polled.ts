import { useEffect, useRef, useState } from "preact/hooks";
import { Refusal } from "../api/client";
import { link } from "../state";

/** What was read last, what went wrong since, and a way to read at once. */
export interface Polled<T> { value: T | null; failure: Refusal | null; isReading: boolean; again: () => void }

/**
 * Reads something now and again every so often while the service is heard and the page is seen; another key starts afresh. The last
 * good answer stays while the next is under way, and after a failure, which is told beside it.
 */
export function usePolled<T>(key: string, read: (signal: AbortSignal) => Promise<T>, everyMilliseconds: number): Polled<T> {
  const [held, setHeld] = useState<{ key: string; value: T | null; failure: Refusal | null } | null>(null);
  const [turn, setTurn] = useState(0);
  const reader = useRef(read);
  reader.current = read;
  const isLive = link.value === "live";
  useEffect(() => {
    const abort = new AbortController();
    let timer: number | undefined;
    const once = async (): Promise<void> => {
      try {
        const value = await reader.current(abort.signal);
        if (!abort.signal.aborted) {
          setHeld({ key, value, failure: null });
        }
      } catch (failure) {
        if (!abort.signal.aborted) {
          const refusal = failure instanceof Refusal ? failure : new Refusal(0, "The answer could not be read.", []);
          setHeld((before) => ({ key, value: before?.key === key ? before.value : null, failure: refusal }));
        }
      }
      if (!abort.signal.aborted && everyMilliseconds > 0) {
        timer = window.setTimeout(() => void (document.hidden ? later() : once()), everyMilliseconds);
      }
    };
    // A page that nobody sees asks nothing, and asks at once when it is seen again.
    const later = (): void => document.addEventListener("visibilitychange", () => void once(), { once: true, signal: abort.signal });
    if (isLive) {
      void once();
    }
    return () => {
      abort.abort();
      window.clearTimeout(timer);
    };
  }, [key, isLive, turn, everyMilliseconds]);
  const current = held?.key === key ? held : null;
  return { value: current?.value ?? null, failure: current?.failure ?? null, isReading: current === null, again: () => setTurn((before) => before + 1) };
}
