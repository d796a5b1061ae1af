import { useEffect, useState } from 'react';

/** True once the component has stood for a while: a skeleton that flashes helps nobody. */
export function useDelayed(afterMs = 200): boolean {
  const [passed, setPassed] = useState(false);
  useEffect(() => {
    const timer = window.setTimeout(() => setPassed(true), afterMs);
    return () => window.clearTimeout(timer);
  }, [afterMs]);
  return passed;
}
