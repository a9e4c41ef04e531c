import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { EventBody, ShowEvent } from '#shared/show/events';
import { reduce, settle, startState } from '#shared/show/reduce';
import type { SceneRun, ShowState } from '#shared/show/state';

const run = (runId: string, landsAt: number): SceneRun => ({
  runId,
  sceneId: `scene of ${runId}`,
  version: 1,
  seed: 1,
  firedAt: landsAt - 50,
  landsAt,
  landsAtBeat: 0,
  transition: { kind: 'crossfade', beats: 2 },
  transitionMs: 1000,
  dials: [],
});

const event = (revision: number, at: number, body: EventBody, epoch = 1): ShowEvent => ({
  epoch,
  revision,
  at,
  commandId: null,
  by: null,
  body,
});
const fired = (revision: number, at: number, fire: SceneRun, screenIds = ['back']): ShowEvent =>
  event(revision, at, { kind: 'scene.fired', screenIds, run: fire });
const start: ShowState = { ...startState('show-1', 'live', 0), epoch: 1 };
const play = (...events: ShowEvent[]): ShowState => events.reduce(reduce, start);

describe('the reducer', () => {
  it('[RED1] changes nothing for an event of an older epoch, or one already seen', () => {
    const state = play(fired(1, 100, run('a', 150)), event(2, 200, { kind: 'dimmer.changed', level: 0.5 }));
    expect(reduce(state, event(2, 300, { kind: 'dimmer.changed', level: 0.1 }))).toBe(state);
    expect(reduce(state, event(1, 300, { kind: 'dimmer.changed', level: 0.1 }))).toBe(state);
    expect(reduce(state, event(99, 300, { kind: 'dimmer.changed', level: 0.1 }, 0))).toBe(state);
    const newer = reduce(state, event(1, 300, { kind: 'dimmer.changed', level: 0.1 }, 2));
    expect([newer.epoch, newer.revision, newer.dimmer]).toEqual([2, 1, 0.1]);
  });

  it('[RED2] replaces what was sent and has not landed, and keeps what has landed as the scene that leaves', () => {
    const state = play(
      fired(1, 100, run('a', 150)),
      // At 200, a is on the wall; b is sent, then replaced by c before it lands.
      fired(2, 200, run('b', 1000)),
      fired(3, 300, run('c', 1000)),
    );
    expect(state.screens.back?.current?.runId).toBe('a');
    expect(state.screens.back?.next?.runId).toBe('c');
    const landed = settle(state.screens.back ?? { previous: null, current: null, next: null }, 1000);
    expect([landed.previous?.runId, landed.current?.runId, landed.next]).toEqual(['a', 'c', null]);
  });

  it('[RED3] lays blackout, calm and freeze over the state, so that restore gives back the very state before', () => {
    const before = play(fired(1, 100, run('a', 150)), event(2, 200, { kind: 'dimmer.changed', level: 0.5 }));
    const kinds = ['blackout.changed', 'calm.changed', 'freeze.changed'] as const;
    let state = before;
    let revision = 2;
    for (const on of [true, false])
      for (const kind of kinds) {
        revision += 1;
        state = reduce(state, event(revision, 300 + revision, { kind, on }));
      }
    const { screens, dimmer, beat, phaseId } = state;
    expect({ screens, dimmer, beat, phaseId }).toEqual({
      screens: before.screens,
      dimmer: before.dimmer,
      beat: before.beat,
      phaseId: before.phaseId,
    });
    expect([state.blackout.on, state.calm.on, state.freeze.on]).toEqual([false, false, false]);
  });

  it('takes back only what has not landed', () => {
    const recall: EventBody = { kind: 'scene.recalled', screenIds: ['back'] };
    const waiting = play(fired(1, 100, run('a', 150)), fired(2, 200, run('b', 1000)), event(3, 300, recall));
    expect([waiting.screens.back?.current?.runId, waiting.screens.back?.next]).toEqual(['a', null]);
    const landed = play(fired(1, 100, run('a', 150)), event(2, 400, recall));
    expect(landed.screens.back?.current?.runId).toBe('a');
  });

  it('is the same on every page: the order of events alone decides', () => {
    const bodies: fc.Arbitrary<EventBody> = fc.oneof(
      fc.record({
        kind: fc.constant('dimmer.changed' as const),
        level: fc.double({ min: 0, max: 1, noNaN: true }),
      }),
      fc.record({ kind: fc.constant('blackout.changed' as const), on: fc.boolean() }),
      fc.record({
        kind: fc.constant('lineup.changed' as const),
        displayId: fc.constantFrom('a', 'b'),
        on: fc.boolean(),
      }),
    );
    fc.assert(
      fc.property(fc.array(bodies, { maxLength: 30 }), fc.nat(29), (list, from) => {
        const events = list.map((body, index) => event(index + 1, index, body));
        const whole = events.reduce(reduce, start);
        // A page that joined in the middle and heard some events twice.
        const joined = events.slice(0, from).reduce(reduce, start);
        expect(events.slice(Math.max(0, from - 3)).reduce(reduce, joined)).toEqual(whole);
      }),
    );
  });
});
