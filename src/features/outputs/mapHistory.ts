import type { OutputMap } from '#shared/mapping/schema';

/** An output map under the hand: everything done can be undone, without end. */
export interface MapHistory {
  past: readonly OutputMap[];
  present: OutputMap;
  future: readonly OutputMap[];
  /** Map that was last saved; the same object as `present` when nothing is unsaved. */
  saved: OutputMap;
  /** One drag or one run of the same key is one step: changes with the same grip replace each other. */
  grip: string | null;
}

export const startHistory = (map: OutputMap): MapHistory => ({
  past: [],
  present: map,
  future: [],
  saved: map,
  grip: null,
});

/** A change. With the same `grip` as the last one it joins that step. */
export const change = (history: MapHistory, map: OutputMap, grip: string | null = null): MapHistory => {
  const joins = grip !== null && grip === history.grip && history.past.length > 0;
  return {
    ...history,
    past: joins ? history.past : [...history.past, history.present],
    present: map,
    future: [],
    grip,
  };
};

export const undo = (history: MapHistory): MapHistory => {
  const last = history.past.at(-1);
  if (!last) return history;
  return {
    ...history,
    past: history.past.slice(0, -1),
    present: last,
    future: [history.present, ...history.future],
    grip: null,
  };
};

export const redo = (history: MapHistory): MapHistory => {
  const [next, ...future] = history.future;
  if (!next) return history;
  return { ...history, past: [...history.past, history.present], present: next, future, grip: null };
};

/** What is shown is what is kept. */
export const markSaved = (history: MapHistory, map: OutputMap): MapHistory => ({
  ...history,
  saved: map,
  grip: null,
});

export const isUnsaved = (history: MapHistory): boolean =>
  history.present !== history.saved && JSON.stringify(history.present) !== JSON.stringify(history.saved);
