import type { RefusalCode } from '../protocol/messages';
import type { Transition } from '../scene/schema';
import { beatAt, beatsPerBar, reanchor, timeOfBeat } from '../time/beatClock';
import type { Command, CommandBody, CommandKind } from './commands';
import type { EventBody } from './events';
import { landing } from './landing';
import { settle } from './reduce';
import { may, type Principal } from './roles';
import type { BeatClock, SceneRun, ShowState } from './state';

/** What the hub knows of a scene that can be fired. */
export interface KnownScene {
  version: number;
  transition: Transition;
  /** Where its dials stand when it lands. */
  dials: readonly number[];
}

/** All that a decision depends on besides state and command. */
export interface DecideContext {
  /** Hub ms. */
  now: number;
  /** ms that the slowest healthy display needs; clamped by `landing`. */
  lead: number;
  principal: Principal;
  mode: 'plan' | 'live' | 'closed';
  scenes: ReadonlyMap<string, KnownScene>;
  screens: ReadonlySet<string>;
  phases: ReadonlySet<string>;
  displays: ReadonlySet<string>;
  /** A new run id and seed; the hub's only chance in a decision, so it is passed in. */
  makeRun: () => { runId: string; seed: number };
}

export type Decision = { events: EventBody[] } | { refusal: RefusalCode };

/** A command that would live longer than this is read as a page with a wrong clock, ms. */
export const longestLife = 60_000;
/** A display shows its name this long, ms. */
export const identifyMs = 8000;
/** Tempo range of the beat clock, beats a minute. */
export const tempoRange = { least: 20, most: 300 } as const;

/** What calms or darkens the wall works after the show too: displays still hang there, drawing. */
const alwaysTaken: ReadonlySet<CommandKind> = new Set(['blackout.set', 'calm.set']);

type Body<K extends CommandKind> = Extract<CommandBody, { kind: K }>;
type Deciders = {
  [K in CommandKind]: (state: ShowState, body: Body<K>, context: DecideContext) => Decision;
};

const happens = (...events: EventBody[]): Decision => ({ events });
const refuse = (refusal: RefusalCode): Decision => ({ refusal });

/** The decision when every id is known, else the refusal. */
const known = (
  ids: readonly string[],
  all: { has(id: string): boolean },
  code: RefusalCode,
  then: () => Decision,
): Decision => (ids.every((id) => all.has(id)) ? then() : refuse(code));

/** Length in ms of a transition at a tempo; a cut has none. */
const transitionMs = (transition: Transition, bpm: number): number =>
  transition.kind === 'cut' ? 0 : (transition.beats * 60_000) / bpm;

const runOf = (
  state: ShowState,
  body: Body<'scene.trigger'>,
  scene: KnownScene,
  context: DecideContext,
): SceneRun => {
  const landsAt = landing(state.beat, body.landsOn, context.now, context.lead);
  const transition = body.transition ?? scene.transition;
  return {
    ...context.makeRun(),
    sceneId: body.sceneId,
    version: scene.version,
    firedAt: context.now,
    landsAt,
    landsAtBeat: beatAt(state.beat, landsAt),
    transition,
    transitionMs: transitionMs(transition, state.beat.bpm),
    dials: [...scene.dials],
  };
};

const beatChange = (beat: BeatClock): Decision =>
  beat.bpm < tempoRange.least || beat.bpm > tempoRange.most
    ? refuse('bad-command')
    : happens({ kind: 'beat.changed', beat });

const deciders: Deciders = {
  'scene.trigger': (state, body, context) => {
    const scene = context.scenes.get(body.sceneId);
    if (!scene) return refuse('unknown-scene');
    return known(body.screenIds, context.screens, 'unknown-screen', () =>
      happens({
        kind: 'scene.fired',
        screenIds: body.screenIds,
        run: runOf(state, body, scene, context),
      }),
    );
  },
  // Only what has not landed can be taken back; when nothing waits, nothing happens.
  'scene.recall': (state, body, { now, screens }) =>
    known(body.screenIds, screens, 'unknown-screen', () => {
      const waiting = body.screenIds.filter((id) => {
        const run = state.screens[id];
        return run !== undefined && settle(run, now).next !== null;
      });
      return waiting.length > 0 ? happens({ kind: 'scene.recalled', screenIds: waiting }) : happens();
    }),
  'phase.set': (_state, { phaseId }, { phases }) =>
    known([phaseId], phases, 'unknown-phase', () => happens({ kind: 'phase.changed', phaseId })),
  'beat.set': (state, { bpm, at, beat, source }, { now }) =>
    beatChange(
      at === null || beat === null
        ? { ...reanchor(state.beat, now), bpm, source }
        : { bpm, at, beat, source },
    ),
  // A later anchor: every beat comes `ms` later, the tempo stays.
  'beat.nudge': (state, { ms }) => beatChange({ ...state.beat, at: state.beat.at + ms }),
  // The count moves by whole beats, so the beat itself does not.
  'beat.one': (state, { at }) => {
    const nearest = Math.round(beatAt(state.beat, at));
    const place = ((nearest % beatsPerBar) + beatsPerBar) % beatsPerBar;
    const shift = place <= beatsPerBar / 2 ? -place : beatsPerBar - place;
    return beatChange({ ...state.beat, beat: state.beat.beat + shift });
  },
  // Anchored on the bar's first beat: bars stay on bars, and scenes' own beats move by less than a bar.
  'beat.scale': (state, { factor }, { now }) => {
    const bar = Math.floor(beatAt(state.beat, now) / beatsPerBar) * beatsPerBar;
    return beatChange({
      ...state.beat,
      bpm: state.beat.bpm * factor,
      at: timeOfBeat(state.beat, bar),
      beat: bar,
    });
  },
  'dimmer.set': (_state, { level }) => happens({ kind: 'dimmer.changed', level }),
  'blackout.set': (_state, { on }) => happens({ kind: 'blackout.changed', on }),
  'calm.set': (_state, { on }) => happens({ kind: 'calm.changed', on }),
  'freeze.set': (_state, { on }) => happens({ kind: 'freeze.changed', on }),
  'dial.set': (_state, { screenIds, dial, value }, { screens }) =>
    known(screenIds, screens, 'unknown-screen', () =>
      happens({ kind: 'dial.changed', screenIds, dial, value }),
    ),
  'lineup.set': (_state, { displayId, on }, { displays }) =>
    known([displayId], displays, 'unknown-display', () => happens({ kind: 'lineup.changed', displayId, on })),
  'display.identify': (_state, { displayId }, { displays, now }) =>
    known([displayId], displays, 'unknown-display', () =>
      happens({ kind: 'display.identified', displayId, until: now + identifyMs }),
    ),
  'display.reload': (_state, { displayId }, { displays }) =>
    known([displayId], displays, 'unknown-display', () => happens()),
  'map.draft': (_state, { displayId }, { displays }) =>
    known([displayId], displays, 'unknown-display', () => happens()),
};

/**
 * What a command makes happen, or why not. Pure: the same state, command and context give the same answer.
 * Each command makes at most one event, so that its id is unique in the journal. Commands that are passed on and
 * forgotten (a map being dragged, a reload) make none.
 */
export const decide = (state: ShowState, command: Command, context: DecideContext): Decision => {
  const { body, expiresAt } = command;
  if (!may(context.principal, `command:${body.kind}`)) return refuse('not-allowed');
  if (context.mode === 'closed' && !alwaysTaken.has(body.kind)) return refuse('show-closed');
  if (expiresAt < context.now) return refuse('expired');
  if (expiresAt > context.now + longestLife) return refuse('bad-command');
  const decider = deciders[body.kind] as (
    state: ShowState,
    body: CommandBody,
    context: DecideContext,
  ) => Decision;
  return decider(state, body, context);
};
