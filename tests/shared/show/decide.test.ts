import { describe, expect, it } from 'vitest';
import { type CommandBody, commandKinds } from '#shared/show/commands';
import { type DecideContext, decide, identifyMs, longestLife, tempoRange } from '#shared/show/decide';
import { startState } from '#shared/show/reduce';
import { may, roles } from '#shared/show/roles';

const now = 100_000;
const context: DecideContext = {
  now,
  lead: 40,
  principal: 'vj',
  mode: 'live',
  scenes: new Map([['tide', { version: 3, transition: { kind: 'crossfade', beats: 4 }, dials: [0.5] }]]),
  screens: new Set(['back', 'left']),
  phases: new Set(['peak']),
  displays: new Set(['d1']),
  makeRun: () => ({ runId: 'run-1', seed: 7 }),
};
const state = startState('show-1', 'live', 0);
const ask = (body: CommandBody, change: Partial<DecideContext> = {}, expiresAt = now + 2000) =>
  decide(state, { id: 'c1', expiresAt, body }, { ...context, ...change });
const fire: CommandBody = { kind: 'scene.trigger', screenIds: ['back'], sceneId: 'tide', landsOn: 'now' };

describe('a trigger', () => {
  it('becomes a run with the scene’s version, dials and transition in ms of the tempo', () => {
    // 4 beats at 120 bpm last 2000 ms.
    expect(ask(fire)).toEqual({
      events: [
        {
          kind: 'scene.fired',
          screenIds: ['back'],
          run: {
            runId: 'run-1',
            seed: 7,
            sceneId: 'tide',
            version: 3,
            firedAt: now,
            landsAt: now + 40,
            landsAtBeat: (now + 40) / 500,
            transition: { kind: 'crossfade', beats: 4 },
            transitionMs: 2000,
            dials: [0.5],
          },
        },
      ],
    });
  });

  it.each([
    ['expired', fire, {}, now - 1],
    ['bad-command', fire, {}, now + longestLife + 1],
    ['show-closed', fire, { mode: 'closed' as const }, now + 1],
    ['not-allowed', fire, { principal: 'assistant' as const }, now + 1],
    ['not-allowed', fire, { principal: 'display' as const }, now + 1],
    ['unknown-scene', { ...fire, sceneId: 'none' }, {}, now + 1],
    ['unknown-screen', { ...fire, screenIds: ['back', 'moon'] }, {}, now + 1],
    ['unknown-phase', { kind: 'phase.set', phaseId: 'none' } as CommandBody, {}, now + 1],
    [
      'unknown-display',
      { kind: 'lineup.set', displayId: 'none', on: true } as CommandBody,
      { principal: 'lead' as const },
      now + 1,
    ],
  ])('is refused with %s (%#)', (code, body, change, expiresAt) => {
    expect(ask(body, change, expiresAt)).toEqual({ refusal: code });
  });
});

describe('the beat', () => {
  const beatOf = (body: CommandBody) => {
    const decision = ask(body);
    if (!('events' in decision) || decision.events[0]?.kind !== 'beat.changed') throw new Error('No beat.');
    return decision.events[0].beat;
  };

  it('keeps its phase when only the tempo is typed', () => {
    const beat = beatOf({ kind: 'beat.set', bpm: 126, at: null, beat: null, source: 'typed' });
    // At 120 bpm since 0, beat 200 is at 100 s.
    expect([beat.bpm, beat.at, beat.beat]).toEqual([126, now, 200]);
  });

  it('comes later by a nudge, at the same tempo', () => {
    const beat = beatOf({ kind: 'beat.nudge', ms: 10 });
    expect([beat.bpm, beat.at]).toEqual([120, 10]);
  });

  it('takes the nearest beat as the one, moving by whole beats only', () => {
    // Beat 201 is nearest to 100 480 ms; it becomes the first of a bar by stepping back one.
    const beat = beatOf({ kind: 'beat.one', at: 100_480 });
    expect(beat.beat).toBe(-1);
  });

  it('is halved and doubled on a bar, and never out of its range', () => {
    expect(beatOf({ kind: 'beat.scale', factor: 0.5 })).toMatchObject({ bpm: 60, at: 100_000, beat: 200 });
    expect(ask({ kind: 'beat.set', bpm: tempoRange.most + 1, at: null, beat: null, source: 'tap' })).toEqual({
      refusal: 'bad-command',
    });
  });
});

describe('a display', () => {
  it('shows its name for eight seconds', () => {
    expect(ask({ kind: 'display.identify', displayId: 'd1' })).toEqual({
      events: [{ kind: 'display.identified', displayId: 'd1', until: now + identifyMs }],
    });
  });
});

describe('every command', () => {
  it('has a row in the role table, and calm and blackout are everybody’s in the crew', () => {
    for (const kind of commandKinds) expect(roles.some((role) => may(role, `command:${kind}`))).toBe(true);
    for (const role of roles)
      for (const kind of ['calm.set', 'blackout.set'] as const)
        expect(may(role, `command:${kind}`)).toBe(true);
    for (const kind of commandKinds) expect(may('display', `command:${kind}`)).toBe(false);
  });
});
