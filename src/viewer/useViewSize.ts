import { useLayoutEffect, useState, type RefObject } from 'react';
import type { ViewSize } from './camera/cameraStore.ts';

/** The size of an element in px, followed as it changes. */
export function useViewSize(element: RefObject<HTMLElement | null>): ViewSize {
  const [size, setSize] = useState<ViewSize>({ width: 1, height: 1 });
  useLayoutEffect(() => {
    const view = element.current;
    if (!view) return undefined;
    const measure = () =>
      setSize((before) =>
        before.width === view.clientWidth && before.height === view.clientHeight
          ? before
          : { width: Math.max(1, view.clientWidth), height: Math.max(1, view.clientHeight) },
      );
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(view);
    return () => observer.disconnect();
  }, [element]);
  return size;
}
