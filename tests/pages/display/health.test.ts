import { describe, expect, it } from 'vitest';
import type { ScreenFrame } from '#shared/scene/drawingList';
import { CanvasHealth, healthTimes, Stillness } from '@/pages/display/health';

const frame = (grey: number, level = 1): ScreenFrame => ({
  screenId: 'wall',
  under: null,
  over: { ground: [grey, grey, grey], items: [] },
  transition: null,
  runId: 'run',
  level,
});

describe('what stands still', () => {
  const seen = (...frames: ScreenFrame[][]): boolean[] => {
    const stillness = new Stillness();
    return frames.map((one) => {
      stillness.see(one);
      return stillness.still;
    });
  };

  it('is a picture that is drawn alike each time', () => {
    expect(seen([frame(0.5)], [frame(0.5)], [frame(0.5)])).toEqual([true, true, true]);
  });

  it('moves from the second difference on', () => {
    expect(seen([frame(0)], [frame(0)], [frame(0.1)], [frame(0.2)])).toEqual([true, true, true, false]);
  });

  it('is a screen without light, whatever it would show', () => {
    expect(seen([frame(0.1, 0)], [frame(0.2, 0)], [frame(0.3, 0)])).toEqual([true, true, true]);
  });

  it('is a display that has no screen', () => {
    expect(seen([], [], [])).toEqual([true, true, true]);
  });
});

describe('a canvas', () => {
  const frames = (health: CanvasHealth, from: number, to: number, draws = true): boolean => {
    let dark = false;
    for (let at = from; at <= to; at += 100) dark = health.frame(at, draws);
    return dark;
  };

  it('counts as dark once nothing could be read back for long', () => {
    const health = new CanvasHealth();
    expect(frames(health, 0, healthTimes.dark)).toBe(false);
    expect(frames(health, healthTimes.dark, healthTimes.dark + 200)).toBe(true);
    health.good(healthTimes.dark + 200);
    expect(health.frame(healthTimes.dark + 300, true)).toBe(false);
  });

  it('is not dark while there is nothing to draw', () => {
    expect(frames(new CanvasHealth(), 0, 3 * healthTimes.dark, false)).toBe(false);
  });

  it('is not dark because the page was hidden', () => {
    const health = new CanvasHealth();
    frames(health, 0, 1000);
    expect(health.frame(1000 + 5 * healthTimes.dark, true)).toBe(false);
  });
});
