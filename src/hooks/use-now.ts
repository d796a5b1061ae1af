import { useEffect, useState } from 'react';
import { serverNow } from '../lib/server-clock.ts';

/** Server time that ticks on whole steps (default one second). */
export function useNow(stepMs = 1000): number {
  const [now, setNow] = useState(serverNow);
  useEffect(() => {
    let timer: number;
    const tick = (): void => {
      const ms = serverNow();
      setNow(ms);
      timer = window.setTimeout(tick, stepMs - (ms % stepMs) + 2);
    };
    tick();
    return () => window.clearTimeout(timer);
  }, [stepMs]);
  return now;
}
