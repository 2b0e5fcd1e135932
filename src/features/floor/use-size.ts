import { type RefCallback, useCallback, useState } from 'react';

/** Content size of an element in whole px, kept current; null before the first measure. */
export function useSize(): [RefCallback<HTMLElement>, { width: number; height: number } | null] {
  const [size, setSize] = useState<{ width: number; height: number } | null>(null);
  const ref = useCallback((element: HTMLElement | null) => {
    if (!element) return undefined;
    const read = () => setSize((before) => {
      const next = { width: Math.floor(element.clientWidth), height: Math.floor(element.clientHeight) };
      return before && before.width === next.width && before.height === next.height ? before : next;
    });
    read();
    const observer = new ResizeObserver(read);
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [ref, size];
}
