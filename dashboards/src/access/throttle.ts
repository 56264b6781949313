import { useEffect, useState } from "preact/hooks";

/** Seconds that are left of a wait, counted down; 0 where there is none. */
export function useWait(): [left: number, wait: (seconds: number) => void] {
  const [until, setUntil] = useState<number | null>(null);
  const [left, setLeft] = useState(0);
  useEffect(() => {
    if (until === null) {
      return;
    }
    const count = (): void => setLeft(Math.max(0, Math.ceil((until - performance.now()) / 1000)));
    count();
    const timer = window.setInterval(count, 250);
    return () => window.clearInterval(timer);
  }, [until]);
  return [left, (seconds) => setUntil(performance.now() + seconds * 1000)];
}
