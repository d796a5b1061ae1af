import { useCallback, useState } from 'react';

export interface Size {
  width: number;
  height: number;
}

/** Size of an element as it changes: `const [ref, size] = useSize()`. */
export function useSize(): [(element: HTMLElement | null) => (() => void) | undefined, Size] {
  const [size, setSize] = useState<Size>({ width: 0, height: 0 });
  const ref = useCallback((element: HTMLElement | null) => {
    if (!element) return undefined;
    const observer = new ResizeObserver(() => {
      setSize({ width: element.clientWidth, height: element.clientHeight });
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [ref, size];
}
