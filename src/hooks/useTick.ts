import { useEffect, useState } from 'react';

/**
 * Renders again every `ms` while the page is visible, and at once when it comes back. Returns `performance.now()` of
 * the last tick. `null` stops the ticking.
 */
export const useTick = (ms: number | null): number => {
  const [now, setNow] = useState(() => performance.now());
  useEffect(() => {
    if (ms === null) return;
    const tick = () => {
      if (!document.hidden) setNow(performance.now());
    };
    tick();
    const timer = setInterval(tick, ms);
    document.addEventListener('visibilitychange', tick);
    return () => {
      clearInterval(timer);
      document.removeEventListener('visibilitychange', tick);
    };
  }, [ms]);
  return now;
};
