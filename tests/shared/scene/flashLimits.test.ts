import { describe, expect, it } from 'vitest';
import { evaluateScreen, fades } from '#shared/scene/evaluate';
import { layerSchema, takeNames, transitionKinds } from '#shared/scene/schema';
import { flashes } from './flashes';
import { bodyOf, inputOf, layerOf, runOf, stateOf } from './sceneMakers';

/** Most flashes a second: WCAG 2.2, success criterion 2.3.1. */
const most = 3;
const framesASecond = 60;
const tempi = [85, 100, 128, 140, 160, 175];

const clockOf = (bpm: number) => ({ bpm, at: 0, beat: 0, source: 'typed' as const });

describe('flash limits', () => {
  it.each(tempi)('keeps the quickest and deepest pulse at %i bpm to the limit', (bpm) => {
    const body = bodyOf([layerOf('words', {}, { pulse: { of: 'opacity', amount: 1, beats: 1 } })]);
    const light = Array.from({ length: 240 }, (_, i) => {
      const t = 10_000 + (i * 1000) / framesASecond;
      const state = stateOf(runOf('a'), { beat: clockOf(bpm) });
      // White words over black: the opacity is the code value; its light is at most that.
      return (evaluateScreen(inputOf(state, { a: body }, t)).over.items[0]?.opacity ?? 0) ** 2.2;
    });
    expect(flashes(light, framesASecond)).toBeLessThanOrEqual(most);
  });

  it('refuses a pulse that is quicker than a beat', () => {
    const layer = layerOf('words', {}, { pulse: { of: 'opacity', amount: 1, beats: 1 } });
    expect(layerSchema.safeParse(layer).success).toBe(true);
    for (const beats of [0.25, 0.5])
      expect(layerSchema.safeParse({ ...layer, pulse: { ...layer.pulse, beats } }).success).toBe(false);
  });

  it.each(takeNames)('changes no light by a take: %s', (take) => {
    const body = bodyOf([layerOf('mark', { assetId: 'm', take, amount: 1 })]);
    for (let t = 10_000; t < 14_000; t += 50)
      expect(evaluateScreen(inputOf(stateOf(runOf('a')), { a: body }, t)).over.items[0]?.opacity).toBe(1);
  });

  it.each(transitionKinds)('goes from scene to scene once, never back: %s', (kind) => {
    const run = runOf('a', { transition: { kind, beats: 1 }, transitionMs: 500 });
    const shares = Array.from({ length: 60 }, (_, i) => {
      const frame = evaluateScreen(inputOf(stateOf(run), { a: bodyOf([]) }, 10_000 + i * 10));
      return frame.transition?.progress ?? 1;
    });
    expect(shares).toEqual([...shares].sort((a, b) => a - b));
  });

  it('fades switches slowly enough that one press is one change', () => {
    // A press and its release are a pair; three a second would take six fades.
    expect(fades.blackout).toBeGreaterThanOrEqual(100);
    expect(fades.calm).toBeGreaterThanOrEqual(500);
  });
});
