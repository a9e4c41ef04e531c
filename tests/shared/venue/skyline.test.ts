import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Screen } from '#shared/venue/schema';
import { personHeightM, type SkylineItem, unroll } from '#shared/venue/skyline';

const screen = (id: string, size: [number, number], centre: [number, number, number], yaw = 0): Screen => ({
  id,
  name: id,
  kind: 'projection',
  width: size[0],
  height: size[1],
  gain: 1,
  centre,
  yaw,
  tilt: 0,
  roll: 0,
});

/** Boathouse 4: a hall 14 m wide and 20 m deep, its six screens as measured for the demo night. */
const boathouse: Screen[] = [
  screen('back', [6, 3.375], [0, 3.6, 0]),
  screen('sail-left', [3.2, 1.8], [-5.2, 3.4, 2], 35),
  screen('sail-right', [3.2, 1.8], [5.2, 3.4, 2], -35),
  screen('booth', [3, 1], [0, 1.1, 1.2]),
  screen('bar', [1.2, 2.1333], [-6.9, 1.9, 11], 90),
  screen('stairs', [1.3, 2.3111], [6.9, 2.1, 11], -90),
];

const at = (items: SkylineItem[], id: string): SkylineItem => {
  const found = items.find((item) => item.screenId === id);
  if (!found) throw new Error(`no ${id} on the strip`);
  return found;
};
const covers = (a: SkylineItem, b: SkylineItem): boolean =>
  a.x + a.width > b.x + 1e-6 &&
  b.x + b.width > a.x + 1e-6 &&
  a.y + a.height > b.y + 1e-6 &&
  b.y + b.height > a.y + 1e-6;

describe('the skyline', () => {
  it('[SKY1] keeps the true size and height of every screen of Boathouse 4', () => {
    const { items } = unroll({ screens: boathouse });
    expect(items).toHaveLength(6);
    for (const { id, width, height, centre } of boathouse) {
      const item = at(items, id);
      expect(item.width).toBeCloseTo(width, 9);
      expect(item.height).toBeCloseTo(height, 9);
      expect(item.y).toBeCloseTo(centre[1] - height / 2, 9);
    }
  });

  it('[SKY2] runs bar, sail left, back wall, sail right, stairs in Boathouse 4', () => {
    const { items } = unroll({ screens: [...boathouse].reverse() });
    const order = [...items]
      .filter((item) => item.screenId !== 'booth')
      .sort((a, b) => a.x - b.x)
      .map((item) => item.screenId);
    expect(order).toEqual(['bar', 'sail-left', 'back', 'sail-right', 'stairs']);
  });

  it('[SKY3] hangs the back wall over the booth, both on the same middle', () => {
    const { items, length } = unroll({ screens: boathouse });
    const back = at(items, 'back');
    const booth = at(items, 'booth');
    expect(back.x + back.width / 2).toBeCloseTo(booth.x + booth.width / 2, 9);
    expect(back.x + back.width / 2).toBeCloseTo(length / 2, 0);
    // Five columns of 1.2 + 3.2 + 6 + 3.2 + 1.3 m and four gaps of 1 m.
    expect(length).toBeCloseTo(18.9, 6);
  });

  it('[SKY3] holds no two screens on the same spot, whatever the room', () => {
    const metre = fc.double({ min: -12, max: 12, noNaN: true });
    const any = fc.array(
      fc.tuple(
        metre,
        fc.double({ min: 0, max: 6, noNaN: true }),
        fc.double({ min: 0, max: 24, noNaN: true }),
        fc.double({ min: 0.2, max: 8, noNaN: true }),
        fc.integer({ min: -180, max: 180 }),
        fc.integer({ min: -90, max: 90 }),
      ),
      { minLength: 1, maxLength: 10 },
    );
    fc.assert(
      fc.property(any, (list) => {
        const screens = list.map(([x, y, z, w, yaw, roll], i) => ({
          ...screen(`s${i}`, [w, w / 2], [x, y, z], yaw),
          roll,
        }));
        const { items, length } = unroll({ screens });
        for (const [i, a] of items.entries()) {
          expect(a.x).toBeGreaterThanOrEqual(-1e-6);
          expect(a.x + a.width).toBeLessThanOrEqual(length + 1e-6);
          for (const b of items.slice(i + 1)) expect(covers(a, b)).toBe(false);
        }
      }),
      { numRuns: 400 },
    );
  });

  it('[SKY4] stands people 1.75 m tall in the gaps, in front of no screen', () => {
    const { items, people, height } = unroll({ screens: boathouse });
    expect(personHeightM).toBe(1.75);
    expect(people).toHaveLength(4);
    for (const x of people) {
      expect(items.some((item) => x > item.x && x < item.x + item.width)).toBe(false);
    }
    expect(height).toBeCloseTo(3.6 + 3.375 / 2, 9);
  });

  it('[SKY4] is an empty strip for a room without screens', () => {
    expect(unroll({ screens: [] })).toEqual({ items: [], length: 0, height: 0, people: [] });
  });
});
