/** A value with everything before it and everything that was undone. Grows without end. */
export interface History<T> {
  past: readonly T[];
  now: T;
  future: readonly T[];
  /** What the last change was, so that one drag is one step; null after undo and redo. */
  tag: string | null;
}

/** A history that begins here. */
export const begin = <T>(now: T): History<T> => ({ past: [], now, future: [], tag: null });

/** A change. Changes in a row with the same tag are one step; null is always a step of its own. */
export const change = <T>(history: History<T>, next: T, tag: string | null): History<T> => {
  if (next === history.now) return history;
  const same = tag !== null && tag === history.tag;
  return { past: same ? history.past : [...history.past, history.now], now: next, future: [], tag };
};

/** One step back; the same when there is none. */
export const undo = <T>(history: History<T>): History<T> => {
  const before = history.past.at(-1);
  if (before === undefined) return history;
  return {
    past: history.past.slice(0, -1),
    now: before,
    future: [history.now, ...history.future],
    tag: null,
  };
};

/** One step forward again; the same when there is none. */
export const redo = <T>(history: History<T>): History<T> => {
  const [after, ...rest] = history.future;
  if (after === undefined) return history;
  return { past: [...history.past, history.now], now: after, future: rest, tag: null };
};
