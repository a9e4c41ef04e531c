import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { OutputMap } from '#shared/mapping/schema';
import { change, isUnsaved, markSaved, redo, startHistory, undo } from '@/features/outputs/mapHistory';

const map = (width: number): OutputMap => ({ raster: [width, 100], regions: [] });

describe('history of an output map', () => {
  it('undoes every step back to the first and redoes it all', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 16, max: 9999 }), { maxLength: 60 }), (widths) => {
        const end = widths.reduce((history, width) => change(history, map(width)), startHistory(map(16)));
        const back = widths.reduce((history) => undo(history), end);
        expect(back.present).toEqual(map(16));
        expect(widths.reduce((history) => redo(history), back).present).toEqual(end.present);
      }),
    );
  });

  it('counts one drag as one step', () => {
    const dragged = [1, 2, 3].reduce(
      (history, n) => change(history, map(100 + n), 'drag 1'),
      startHistory(map(100)),
    );
    expect(undo(dragged).present).toEqual(map(100));
    const again = change(dragged, map(300), 'drag 2');
    expect(undo(again).present).toEqual(map(103));
  });

  it('knows what is not saved', () => {
    const changed = change(startHistory(map(100)), map(200));
    expect(isUnsaved(changed)).toBe(true);
    expect(isUnsaved(markSaved(changed, changed.present))).toBe(false);
    expect(isUnsaved(undo(changed))).toBe(false);
  });
});
