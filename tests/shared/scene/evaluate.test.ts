import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { DrawItem, ScreenFrame } from '#shared/scene/drawingList';
import { evaluateScreen, fades } from '#shared/scene/evaluate';
import type { SceneBody } from '#shared/scene/schema';
import type { ShowState } from '#shared/show/state';
import { bodyOf, inputOf, layerOf, runOf, stateOf } from './sceneMakers';

const drawn = (state: ShowState, body: SceneBody, t: number, durations = {}): ScreenFrame =>
  evaluateScreen(inputOf(state, { a: body }, t, durations));

const first = (frame: ScreenFrame): DrawItem => {
  const [item] = frame.over.items;
  if (!item) throw new Error('Nothing is drawn.');
  return item;
};

/** The first item of a scene with one layer, some seconds after it landed. */
const later = (body: SceneBody, seconds: number, durations = {}): DrawItem =>
  first(drawn(stateOf(runOf('a')), body, 10_000 + seconds * 1000, durations));

describe('layers', () => {
  it('draws a drawing by the beats and the seconds since its scene landed', () => {
    const { source, key } = later(bodyOf([layerOf('drawing')]), 3);
    // 120 beats a minute: two a second.
    expect(source).toMatchObject({ kind: 'drawing', drawing: 'meadow', beat: 6, timeS: 3 });
    expect(key).toBe('run-a/drawing1');
  });

  it('plays a clip at its rate, round and round', () => {
    const body = bodyOf([layerOf('clip', { assetId: 'c', rate: 1.5 })]);
    expect(later(body, 3, { c: 4 }).source).toEqual({
      kind: 'clip',
      assetId: 'c',
      positionS: 0.5,
      rate: 1.5,
    });
  });

  it('fits a clip to bars by the beat clock', () => {
    const body = bodyOf([layerOf('clip', { assetId: 'c', fitBars: 4 })]);
    // Worked value: 7.2 s on 4 bars at 120 → 8 s a turn, rate 0.9; after 2 s a quarter of it.
    const { source } = later(body, 2, { c: 7.2 });
    expect(source).toMatchObject({ kind: 'clip' });
    expect(source.kind === 'clip' && source.rate).toBeCloseTo(0.9, 10);
    expect(source.kind === 'clip' && source.positionS).toBeCloseTo(1.8, 10);
  });

  it('leaves out what has no file, no length or no words, and what is off', () => {
    const body = bodyOf([
      layerOf('clip'),
      layerOf('clip', { assetId: 'unknown' }),
      layerOf('mark'),
      layerOf('stills'),
      layerOf('words', { text: '  ' }),
      layerOf('drawing', {}, { on: false }),
    ]);
    expect(drawn(stateOf(runOf('a')), body, 12_000).over.items).toEqual([]);
  });

  it('shows each still once before any comes twice, and crosses between two', () => {
    const assetIds = ['p', 'q', 'r'];
    const body = bodyOf([layerOf('stills', { assetIds, everyBeats: 4, seed: 7 })]);
    // 4 beats at 120 are 2 s; in the last part of each slot one picture stands alone.
    const shown = [1.9, 3.9, 5.9].map((seconds) => {
      const frame = drawn(stateOf(runOf('a')), body, 10_000 + seconds * 1000);
      expect(frame.over.items).toHaveLength(1);
      const { source } = first(frame);
      return source.kind === 'picture' ? source.assetId : '';
    });
    expect([...shown].sort()).toEqual(assetIds);
    const crossing = drawn(stateOf(runOf('a')), body, 12_250).over.items;
    expect(crossing.map((item) => item.opacity)).toEqual([1, 0.5]);
    expect(new Set(crossing.map((item) => item.key)).size).toBe(2);
  });

  it('scales the opacity by the dial it hangs on', () => {
    const body = bodyOf([layerOf('words', {}, { dial: 1, opacity: 0.8 })]);
    const frame = drawn(stateOf(runOf('a', { dials: [0, 0.5] })), body, 12_000);
    expect(first(frame).opacity).toBeCloseTo(0.4, 12);
  });

  it('pulses on the beat and never above the layer’s own opacity', () => {
    const body = bodyOf([layerOf('words', {}, { pulse: { of: 'opacity', amount: 0.6, beats: 1 } })]);
    expect(later(body, 1).opacity).toBeCloseTo(1, 12);
    expect(later(body, 1.25).opacity).toBeCloseTo(0.4, 12);
  });
});

describe('takes', () => {
  const mark = (take: 'still' | 'push' | 'swing' | 'hand shake' | 'drift in' | 'breathe', seconds: number) =>
    later(bodyOf([layerOf('mark', { assetId: 'm', take, amount: 1, seed: 3 })]), seconds).place;

  it('leaves a still mark where it was put', () => {
    expect(mark('still', 3.3)).toEqual({ x: 0, y: 0, scale: 0.6, turn: 0 });
  });

  it('pushes on the beat and falls back', () => {
    expect(mark('push', 1).scale).toBeCloseTo(0.6 * 1.18, 10);
    expect(mark('push', 1.4).scale).toBeLessThan(0.62);
  });

  it('comes to the middle in sixteen beats', () => {
    expect(Math.abs(mark('drift in', 0).x)).toBeGreaterThan(0.15);
    expect(Math.abs(mark('drift in', 8.5).x)).toBeLessThan(0.02);
  });

  it.each(['hand shake', 'swing', 'breathe', 'drift in', 'push'] as const)('moves smoothly: %s', (take) => {
    for (let s = 0.01; s < 4; s += 1 / 60) {
      const [a, b] = [mark(take, s), mark(take, s + 1 / 600)];
      // A push starts on the beat at once: that is its nature. It must not leave its place.
      expect(Math.hypot(b.x - a.x, b.y - a.y)).toBeLessThan(0.01);
      expect(Math.abs(b.turn - a.turn)).toBeLessThan(0.01);
    }
  });
});

describe('transitions', () => {
  const [old, young] = [runOf('a', { landsAt: 2_000, landsAtBeat: 4 }), runOf('b', { landsAt: 10_000 })];
  const bodies = { a: bodyOf([], { ground: '#ff0000' }), b: bodyOf([], { ground: '#0000ff' }) };
  const crossing = { ...young, transition: { kind: 'crossfade' as const, beats: 4 }, transitionMs: 2000 };
  const at = (t: number, next: typeof crossing = crossing) =>
    evaluateScreen(
      inputOf(stateOf(null, { screens: { wall: { previous: null, current: old, next } } }), bodies, t),
    );

  it('keeps the old scene until the new one lands', () => {
    expect(at(9_999)).toMatchObject({ runId: 'run-a', under: null, over: { ground: [1, 0, 0] } });
  });

  it('crosses from old to new in the time that was stamped', () => {
    expect(at(10_500)).toMatchObject({
      runId: 'run-b',
      under: { ground: [1, 0, 0] },
      over: { ground: [0, 0, 1] },
      transition: { kind: 'crossfade', progress: 0.25 },
    });
    expect(at(12_000)).toMatchObject({ under: null, transition: null, over: { ground: [0, 0, 1] } });
  });

  it('cuts at once', () => {
    const cut = { ...crossing, transition: { kind: 'cut' as const, beats: 0 }, transitionMs: 0 };
    expect(at(10_000, cut as unknown as typeof crossing)).toMatchObject({
      under: null,
      transition: null,
      runId: 'run-b',
    });
  });
});

describe('switches', () => {
  const body = bodyOf([layerOf('drawing')]);
  const show = stateOf(runOf('a'));

  it('goes black within its fade, and reports no run then', () => {
    const state = { ...show, blackout: { on: true, at: 20_000 } };
    expect(drawn(state, body, 20_000 + fades.blackout / 2).level).toBeCloseTo(0.5, 12);
    expect(drawn(state, body, 20_000 + fades.blackout)).toMatchObject({ level: 0, runId: null });
  });

  it('takes the dimmer as a factor', () => {
    expect(drawn({ ...show, dimmer: 0.3 }, body, 20_000).level).toBeCloseTo(0.3, 12);
  });

  it('lays calm over the show and gives back the very picture before', () => {
    const before = drawn(show, body, 25_000);
    const calm = drawn({ ...show, calm: { on: true, at: 20_000 } }, body, 25_000);
    expect(first(calm).source).toMatchObject({ drawing: 'tide' });
    expect(calm.under).toBeNull();
    expect(drawn({ ...show, calm: { on: false, at: 22_000 } }, body, 25_000)).toEqual(before);
  });

  it('comes to calm even while frozen', () => {
    const frozen = { ...show, freeze: { on: true, at: 20_000 }, calm: { on: true, at: 21_000 } };
    expect(first(drawn(frozen, body, 22_000)).source).toMatchObject({ drawing: 'tide' });
  });

  it('stands still while frozen: the same picture at any later time', () => {
    const frozen = { ...show, freeze: { on: true, at: 20_000 } };
    const held = drawn(frozen, body, 20_000);
    fc.assert(
      fc.property(fc.double({ min: 20_000, max: 4_000_000, noNaN: true }), (t) => {
        expect(drawn(frozen, body, t)).toEqual(held);
      }),
    );
    expect(drawn(frozen, body, 19_000)).not.toEqual(held);
  });

  it('blacks out while frozen too', () => {
    const state = { ...show, freeze: { on: true, at: 20_000 }, blackout: { on: true, at: 21_000 } };
    expect(drawn(state, body, 22_000).level).toBe(0);
  });
});

describe('determinism', () => {
  it('gives two displays the same frame for the same state and time', () => {
    const body = bodyOf([
      layerOf('drawing'),
      layerOf('mark', { assetId: 'm', take: 'hand shake', seed: 9 }),
      layerOf('stills', { assetIds: ['p', 'q'], everyBeats: 2, seed: 4 }),
    ]);
    fc.assert(
      fc.property(fc.double({ min: 10_000, max: 9_000_000, noNaN: true }), (t) => {
        const state = structuredClone(stateOf(runOf('a')));
        expect(drawn(state, structuredClone(body), t)).toEqual(drawn(stateOf(runOf('a')), body, t));
      }),
    );
  });

  it('shows an empty screen black, and a scene it has no body of too', () => {
    for (const state of [stateOf(null), stateOf(runOf('lost'))])
      expect(drawn(state, body0, 12_000)).toMatchObject({
        over: { ground: [0, 0, 0], items: [] },
        under: null,
      });
  });
});

const body0 = bodyOf([]);
