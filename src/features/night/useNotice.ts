import { useCallback, useEffect, useRef, useState } from 'react';
import { vibrate } from '@/inputs/vibrate';

/** A short answer near the thumb: a refusal, or what was not sent. */
export interface Notice {
  kind: 'refused' | 'not-sent';
  words: string;
  /** Counts up, so that the same words twice are two notices. */
  turn: number;
}

const shownMs = 3500;

/** The newest refusal, shown for 3.5 s, felt at once. */
export const useNotice = (): {
  notice: Notice | null;
  tell: (kind: Notice['kind'], words: string) => void;
} => {
  const [notice, setNotice] = useState<Notice | null>(null);
  const turn = useRef(0);
  const tell = useCallback((kind: Notice['kind'], words: string) => {
    turn.current += 1;
    setNotice({ kind, words, turn: turn.current });
    vibrate('refused');
  }, []);
  useEffect(() => {
    if (!notice) return;
    const timer = setTimeout(() => setNotice(null), shownMs);
    return () => clearTimeout(timer);
  }, [notice]);
  return { notice, tell };
};
