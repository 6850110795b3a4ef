/** The width of an element in px, kept up to date; null until it is measured (on the server and before the first layout). */
import { type RefObject, useLayoutEffect, useRef, useState } from "react";

export function useWidth<T extends HTMLElement>(): { ref: RefObject<T | null>; width: number | null } {
  const ref = useRef<T>(null);
  const [width, setWidth] = useState<number | null>(null);
  useLayoutEffect(() => {
    const element = ref.current;
    if (!element) return;
    const measure = (): void => setWidth(Math.floor(element.clientWidth));
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return { ref, width };
}
