import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { applyHomography, homographyTo } from '#shared/mapping/homography';
import type { Corners } from '#shared/mapping/schema';
import { coversScreen, fitted, layerMap } from '@/stage/layerPlace';
import { columnsTo, cornersOn, pictureSize } from '@/stage/regionShape';

const at = (rows: ReturnType<typeof layerMap>, x: number, y: number): number[] =>
  [rows.across, rows.down].map(([a, b, c]) => a * x + b * y + c);

const screen = { width: 1600, height: 900 };
const rest = { x: 0, y: 0, scale: 1, turn: 0 };

describe('where a layer lies', () => {
  it('covers, contains or stretches, as CSS object-fit does', () => {
    const square = { width: 100, height: 100 };
    expect(fitted('cover', square, screen)).toEqual({ width: 1600, height: 1600 });
    expect(fitted('contain', square, screen)).toEqual({ width: 900, height: 900 });
    expect(fitted('stretch', square, screen)).toEqual(screen);
  });

  it('has the middle of its picture where it was put', () => {
    const map = layerMap(
      { fit: 'contain', place: { x: 0.2, y: -0.1, scale: 0.5, turn: 0.7 } },
      screen,
      screen,
    );
    const [x = 0, y = 0] = at(map, 0.7, 0.4);
    expect([x, y]).toEqual([expect.closeTo(0.5, 10), expect.closeTo(0.5, 10)]);
  });

  it('turns clockwise without bending', () => {
    // A quarter turn: what was the picture's left edge is at the top.
    const square = { width: 900, height: 900 };
    const map = layerMap({ fit: 'contain', place: { ...rest, turn: Math.PI / 2 } }, square, screen);
    const [x = 0, y = 0] = at(map, 0.5, 0);
    expect([x, y]).toEqual([expect.closeTo(0, 10), expect.closeTo(0.5, 10)]);
  });

  it('needs no edge only when it covers its screen', () => {
    const covers = (fit: 'cover' | 'contain' | 'stretch', place = rest) =>
      coversScreen(layerMap({ fit, place }, { width: 400, height: 300 }, screen));
    expect([covers('cover'), covers('stretch'), covers('contain')]).toEqual([true, true, false]);
    expect(covers('cover', { ...rest, x: 0.1 })).toBe(false);
    expect(covers('cover', { ...rest, scale: 3, turn: 0.4 })).toBe(true);
  });
});

const corners: Corners = [
  [60, 40],
  [1200, 90],
  [1100, 660],
  [120, 560],
];

describe('where a region lies', () => {
  it('draws a point of the picture where the homography puts it', () => {
    const canvas = { width: 1280, height: 720 };
    const columns = columnsTo(corners, canvas);
    const h = homographyTo(corners);
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (u, v) => {
          const row = (r: number): number =>
            (columns?.[r] ?? 0) * u + (columns?.[3 + r] ?? 0) * v + (columns?.[6 + r] ?? 0);
          const [x, y] = applyHomography(h, [u, v]);
          expect(((row(0) / row(2) + 1) / 2) * canvas.width).toBeCloseTo(x, 6);
          expect(((1 - row(1) / row(2)) / 2) * canvas.height).toBeCloseTo(y, 6);
          expect(row(2)).toBeGreaterThan(0);
        },
      ),
    );
  });

  it('draws nothing of corners that make no picture', () => {
    const crossed: Corners = [corners[0], corners[2], corners[1], corners[3]];
    expect(columnsTo(crossed, screen)).toBeNull();
  });

  it('scales a map to a display with another raster', () => {
    const region = {
      id: 'r',
      screenId: 's',
      name: 'r',
      source: { x: 0, y: 0, w: 1, h: 1 },
      corners,
      brightness: 1,
    };
    expect(cornersOn(region, [1280, 720], { width: 640, height: 360 })[1]).toEqual([600, 45]);
  });

  it('asks for as many pixels as the largest region shows, in the screen’s shape, and never more than 1920', () => {
    const full = (w: number, h: number): Corners => [
      [0, 0],
      [w, 0],
      [w, h],
      [0, h],
    ];
    const all = { x: 0, y: 0, w: 1, h: 1 };
    expect(pictureSize([{ corners: full(1280, 720), source: all }], 16 / 9)).toEqual({
      width: 1280,
      height: 720,
    });
    expect(pictureSize([{ corners: full(640, 720), source: { ...all, w: 0.5 } }], 16 / 9).width).toBe(1280);
    expect(pictureSize([{ corners: full(7680, 4320), source: all }], 16 / 9)).toEqual({
      width: 1920,
      height: 1080,
    });
    expect(pictureSize([{ corners: full(100, 3000), source: all }], 0.25)).toEqual({
      width: 480,
      height: 1920,
    });
  });
});
