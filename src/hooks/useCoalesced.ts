import { useCallback, useEffect, useRef } from 'react';

/**
 * Calls `act` with the newest value at most once every `ms`: the first at once, the last never lost. For sliders
 * that must not flood the hub.
 */
export const useCoalesced = <T>(act: (value: T) => void, ms: number): ((value: T) => void) => {
  const latest = useRef(act);
  latest.current = act;
  const waiting = useRef<{ value: T } | null>(null);
  const timer = useRef<ReturnType<typeof setTimeout> | null>(null);

  const step = useCallback(() => {
    timer.current = null;
    const next = waiting.current;
    if (!next) return;
    waiting.current = null;
    latest.current(next.value);
    timer.current = setTimeout(step, ms);
  }, [ms]);

  useEffect(
    () => () => {
      if (timer.current) clearTimeout(timer.current);
      if (waiting.current) latest.current(waiting.current.value);
    },
    [],
  );

  return useCallback(
    (value: T) => {
      waiting.current = { value };
      if (!timer.current) step();
    },
    [step],
  );
};
