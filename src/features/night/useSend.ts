import { useCallback, useRef, useState } from 'react';
import type { CommandBody } from '#shared/show/commands';
import { notSentWords } from '#shared/show/words';
import { vibrate } from '@/inputs/vibrate';
import type { ShowLink } from '@/link/types';
import { refusalFor } from './refusals';
import type { Notice } from './useNotice';

/** A press that the hub has not taken within this is given up: it was not sent and never fires, ms. */
const pressExpiryMs = 1000;

export interface Sender {
  /** Sends one command. `key` names what is waiting for the answer; it is in `asking` until then. */
  send: (key: string, body: CommandBody, quiet?: boolean) => Promise<boolean>;
  /** Keys of what was asked and has no answer yet. */
  asking: ReadonlySet<string>;
}

/**
 * Sends what a hand asked for: role first, then link, then the hub's answer. Whatever is not taken is said near the
 * thumb; nothing is kept for later.
 */
export const useSend = (link: ShowLink, tell: (kind: Notice['kind'], words: string) => void): Sender => {
  const [asking, setAsking] = useState<ReadonlySet<string>>(new Set());
  const counts = useRef(new Map<string, number>());

  const mark = useCallback((key: string, by: 1 | -1) => {
    const count = (counts.current.get(key) ?? 0) + by;
    if (count > 0) counts.current.set(key, count);
    else counts.current.delete(key);
    setAsking(new Set(counts.current.keys()));
  }, []);

  const send = useCallback(
    async (key: string, body: CommandBody, quiet = false): Promise<boolean> => {
      const { principal, status } = link.getSnapshot();
      const reason = refusalFor(principal, body.kind);
      if (reason) {
        tell('refused', reason);
        return false;
      }
      if (status !== 'on') {
        tell('not-sent', notSentWords.noLink);
        return false;
      }
      if (!quiet) vibrate('tap');
      mark(key, 1);
      const result = await link.send(body, { expiryMs: pressExpiryMs });
      mark(key, -1);
      if (result.outcome === 'taken') return true;
      tell(result.outcome === 'refused' ? 'refused' : 'not-sent', result.words);
      return false;
    },
    [link, mark, tell],
  );
  return { send, asking };
};
