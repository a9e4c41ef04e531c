import type { EventBody, ShowEvent } from './events';
import type { SceneRun, ScreenRun, ShowState } from './state';

export const emptyScreen: ScreenRun = { previous: null, current: null, next: null };

/** A screen's run with everything that has landed by `t` moved down: next → current → previous. Pure. */
export const settle = (run: ScreenRun, t: number): ScreenRun =>
  run.next && run.next.landsAt <= t ? { previous: run.current, current: run.next, next: null } : run;

/** A run of a screen by its id, wherever it stands at hub time `t`; null when the screen has moved on. */
export const findRun = (state: ShowState, screenId: string, runId: string, t: number): SceneRun | null => {
  const screen = state.screens[screenId];
  if (!screen) return null;
  const { previous, current, next } = settle(screen, t);
  return [current, next, previous].find((run) => run?.runId === runId) ?? null;
};

/** The state of a show before its first event. */
export const startState = (showId: string, room: ShowState['room'], at: number): ShowState => ({
  showId,
  room,
  epoch: 0,
  revision: 0,
  at,
  phaseId: null,
  screens: {},
  beat: { bpm: 120, at, beat: 0, source: 'typed' },
  dimmer: 1,
  blackout: { on: false, at },
  calm: { on: false, at },
  freeze: { on: false, at },
  lineUp: [],
  identify: {},
});

type Changes = Partial<Omit<ShowState, 'epoch' | 'revision' | 'at'>>;
type Reducers = {
  [K in EventBody['kind']]: (state: ShowState, body: Extract<EventBody, { kind: K }>, at: number) => Changes;
};

const onScreens = (
  state: ShowState,
  ids: readonly string[],
  change: (run: ScreenRun) => ScreenRun,
): Changes => ({
  screens: {
    ...state.screens,
    ...Object.fromEntries(ids.map((id) => [id, change(state.screens[id] ?? emptyScreen)])),
  },
});

const reducers: Reducers = {
  'scene.fired': (state, { screenIds, run }, at) =>
    onScreens(state, screenIds, (screen) => ({ ...settle(screen, at), next: run })),
  'scene.recalled': (state, { screenIds }, at) =>
    onScreens(state, screenIds, (screen) => ({ ...settle(screen, at), next: null })),
  'phase.changed': (_state, { phaseId }) => ({ phaseId }),
  'beat.changed': (_state, { beat }) => ({ beat }),
  'dimmer.changed': (_state, { level }) => ({ dimmer: level }),
  'blackout.changed': (_state, { on }, at) => ({ blackout: { on, at } }),
  'calm.changed': (_state, { on }, at) => ({ calm: { on, at } }),
  'freeze.changed': (_state, { on }, at) => ({ freeze: { on, at } }),
  'dial.changed': (state, { screenIds, dial, value }, at) =>
    onScreens(state, screenIds, (screen) => {
      const settled = settle(screen, at);
      if (!settled.current) return settled;
      const dials = Array.from({ length: Math.max(settled.current.dials.length, dial + 1) }, (_, i) =>
        i === dial ? value : (settled.current?.dials[i] ?? 0),
      );
      return { ...settled, current: { ...settled.current, dials } };
    }),
  'lineup.changed': (state, { displayId, on }) => ({
    lineUp: on ? [...new Set([...state.lineUp, displayId])] : state.lineUp.filter((id) => id !== displayId),
  }),
  'display.identified': (state, { displayId, until }, at) => ({
    identify: {
      ...Object.fromEntries(Object.entries(state.identify).filter(([, end]) => end > at)),
      [displayId]: until,
    },
  }),
  'map.saved': () => ({}),
};

/**
 * The one reducer of hub, pages, replay and tests. An event of an older epoch, or one already seen, changes nothing:
 * a page never goes back.
 */
export const reduce = (state: ShowState, event: ShowEvent): ShowState => {
  const old = event.epoch < state.epoch || (event.epoch === state.epoch && event.revision <= state.revision);
  if (old) return state;
  const reducer = reducers[event.body.kind] as (state: ShowState, body: EventBody, at: number) => Changes;
  return {
    ...state,
    ...reducer(state, event.body, event.at),
    epoch: event.epoch,
    revision: event.revision,
    at: event.at,
  };
};
