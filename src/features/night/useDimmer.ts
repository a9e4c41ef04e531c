import { useCallback, useRef, useState } from 'react';
import { useCoalesced } from '@/hooks/useCoalesced';
import type { Sender } from './useSend';

/** Least time between two dimmer commands: 20 a second, ms. */
const dimmerMs = 50;
/** The hand's own value is shown this long after its last move; then the hub's is true again, ms. */
const holdMs = 800;

/** The dimmer under a hand: shows the hand's value while it moves, the hub's otherwise. 0..1 */
export const useDimmer = (
  hubLevel: number,
  send: Sender['send'],
): { level: number; setLevel: (level: number) => void } => {
  const [own, setOwn] = useState<number | null>(null);
  const timer = useRef<ReturnType<typeof setTimeout> | null>(null);
  const push = useCoalesced((level: number) => {
    void send('dimmer', { kind: 'dimmer.set', level }, true).then((taken) => {
      if (!taken) setOwn(null);
    });
  }, dimmerMs);
  const setLevel = useCallback(
    (level: number) => {
      const held = Math.round(Math.min(1, Math.max(0, level)) * 1000) / 1000;
      setOwn(held);
      push(held);
      if (timer.current) clearTimeout(timer.current);
      timer.current = setTimeout(() => setOwn(null), holdMs);
    },
    [push],
  );
  return { level: own ?? hubLevel, setLevel };
};
