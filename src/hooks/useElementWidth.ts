import { useCallback, useState } from 'react';

/** The width of an element in px, kept true while it is resized: attach the returned ref to it. */
export function useElementWidth<T extends Element>(): [(element: T | null) => void, number] {
  const [width, setWidth] = useState(0);
  const attach = useCallback((element: T | null) => {
    if (!element) return undefined;
    const observer = new ResizeObserver(() => setWidth(element.clientWidth));
    observer.observe(element);
    setWidth(element.clientWidth);
    return () => observer.disconnect();
  }, []);
  return [attach, width];
}
