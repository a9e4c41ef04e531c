import { useCallback, useRef, useState } from 'react';
import { addTap, beatForTap, tapPauseMs, tappedTempo, tapsToSend } from '#shared/time/tapTempo';
import type { ShowLink } from '@/link/types';
import type { Sender } from './useSend';

/** What the disc shows while a hand taps; null when nobody does. */
export interface Tapping {
  taps: number;
  bpm: number | null;
}

/**
 * Tap tempo: from the fourth tap on, each tap sends the fitted tempo with its grid; the first tap is the first beat of
 * a bar. Two seconds without a tap end the series.
 */
export const useTapTempo = (
  link: ShowLink,
  send: Sender['send'],
): { tapping: Tapping | null; tap: (performanceMs: number) => void } => {
  const taps = useRef<readonly number[]>([]);
  const rest = useRef<ReturnType<typeof setTimeout> | null>(null);
  const [tapping, setTapping] = useState<Tapping | null>(null);

  const tap = useCallback(
    (performanceMs: number) => {
      taps.current = addTap(taps.current, performanceMs);
      const tempo = tappedTempo(taps.current);
      setTapping({ taps: taps.current.length, bpm: tempo?.bpm ?? null });
      if (rest.current) clearTimeout(rest.current);
      rest.current = setTimeout(() => setTapping(null), tapPauseMs);
      const { state } = link.getSnapshot();
      if (!tempo || !state || tempo.taps < tapsToSend) return;
      const at = link.hubTimeOf(tempo.at);
      const beat = beatForTap(state.beat, at, tempo.beatsFromOne);
      const bpm = Math.round(tempo.bpm * 100) / 100;
      void send('beat', { kind: 'beat.set', bpm, at, beat, source: 'tap' }, true);
    },
    [link, send],
  );
  return { tapping, tap };
};
