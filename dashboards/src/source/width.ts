import type { RefObject } from "preact";
import { useEffect, useRef, useState } from "preact/hooks";

/** The width of an element in pixels, as it changes: drawings are made for it, so that their writing keeps its size. */
export function useWidth<T extends HTMLElement>(least = 280): [RefObject<T>, number] {
  const element = useRef<T>(null);
  const [width, setWidth] = useState(least);
  useEffect(() => {
    const measure = (): void => setWidth(Math.max(least, Math.floor(element.current?.clientWidth ?? least)));
    measure();
    const sizes = new ResizeObserver(measure);
    sizes.observe(element.current!);
    return () => sizes.disconnect();
  }, []);
  return [element, width];
}
