import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { newBody, newLayer } from '#shared/scene/defaults';
import { sceneBodySchema } from '#shared/scene/schema';
import { assetsOfBody } from '#shared/scene/sourceFiles';
import { moveLayer, removeDial } from '@/features/scenes/bodyEdits';
import { begin, change, redo, undo } from '@/features/scenes/history';
import { lackOf } from '@/features/scenes/lack';

const bodyOf = (...ids: string[]) => ({ ...newBody(), layers: ids.map((id) => newLayer('words', id)) });
const order = (body: ReturnType<typeof bodyOf>) => body.layers.map(({ id }) => id).join('');

describe('history of a scene', () => {
  it('undoes every step back to the first and redoes it all', () => {
    fc.assert(
      fc.property(fc.array(fc.string(), { maxLength: 60 }), (steps) => {
        const end = steps.reduce(
          (history, step, at) => change(history, `${at}${step}`, null),
          begin('first'),
        );
        const back = steps.reduce((history) => undo(history), end);
        expect(back.now).toBe('first');
        expect(steps.reduce((history) => redo(history), back).now).toBe(end.now);
      }),
    );
  });

  it('counts changes in a row with one tag as one step, also after an undo between', () => {
    const dragged = [1, 2, 3].reduce((history, n) => change(history, n, 'drag'), begin(0));
    expect(undo(dragged).now).toBe(0);
    const again = change(undo(dragged), 9, 'drag');
    expect(undo(again).now).toBe(0);
  });

  it('forgets what was undone once something else is done, and stays at either end', () => {
    const branched = change(undo(change(begin('a'), 'b', null)), 'c', null);
    expect(redo(branched).now).toBe('c');
    expect(undo(undo(undo(branched))).now).toBe('a');
  });
});

describe('edits of a body', () => {
  it('moves a layer and holds it at front and back', () => {
    expect(order(moveLayer(bodyOf('a', 'b', 'c'), 'a', 2))).toBe('bca');
    expect(order(moveLayer(bodyOf('a', 'b', 'c'), 'b', 99))).toBe('acb');
    expect(order(moveLayer(bodyOf('a', 'b', 'c'), 'b', -4))).toBe('bac');
  });

  it('gives back the very same body when nothing moves', () => {
    const body = bodyOf('a', 'b');
    expect(moveLayer(body, 'b', 7)).toBe(body);
    expect(moveLayer(body, 'nobody', 0)).toBe(body);
  });

  it('lets layers of a removed dial go and keeps the others on theirs', () => {
    const layers = [null, 0, 1, 2].map((dial, at) => ({ ...newLayer('words', `l${at}`), dial }));
    const dials = ['One', 'Two', 'Three'].map((name) => ({ name, value: 1 }));
    const left = removeDial({ ...newBody(), layers, dials }, 1);
    expect(left.dials.map(({ name }) => name)).toEqual(['One', 'Three']);
    expect(left.layers.map(({ dial }) => dial)).toEqual([null, 0, null, 1]);
  });

  it('names every file a body draws', () => {
    const stills = newLayer('stills', 's');
    const clip = newLayer('clip', 'c');
    if (stills.source.kind !== 'stills' || clip.source.kind !== 'clip') throw new Error('not what was asked');
    const layers = [
      { ...stills, source: { ...stills.source, assetIds: ['one', 'two'] } },
      { ...clip, source: { ...clip.source, assetId: 'three' } },
      newLayer('mark', 'm'),
    ];
    expect(assetsOfBody({ ...newBody(), layers })).toEqual(['one', 'two', 'three']);
  });
});

describe('what a draft lacks', () => {
  const whole = { name: 'Low tide', phaseId: null, energy: 4, body: bodyOf('a') };

  it('lacks nothing when everything has a name', () => {
    expect(lackOf(whole)).toBeNull();
  });

  it.each([
    ['scene', { ...whole, name: '  ' }],
    ['layer', { ...whole, body: { ...whole.body, layers: [{ ...newLayer('words', 'a'), name: '' }] } }],
    ['dial', { ...whole, body: { ...whole.body, dials: [{ name: '', value: 1 }] } }],
  ])('says that the %s has no name, as the server would', (thing, draft) => {
    expect(lackOf(draft)).toMatch(new RegExp(thing));
    const taken = sceneBodySchema.safeParse(draft.body).success && draft.name.trim() !== '';
    expect(taken).toBe(false);
  });
});
