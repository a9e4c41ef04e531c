import { createRequire } from 'node:module';
import fc from 'fast-check';
import { beforeAll, describe, expect, it } from 'vitest';
import {
  applyHomography,
  homographyTo,
  invertHomography,
  isConvex,
  unitSquare,
} from '#shared/mapping/homography';
import type { Corners } from '#shared/mapping/schema';

/** A convex quadrilateral: a square with each corner moved by less than a quarter of its side: thinner ones are ill-conditioned in any solver. */
const quads = fc
  .array(
    fc.tuple(
      fc.double({ min: -220, max: 220, noNaN: true }),
      fc.double({ min: -220, max: 220, noNaN: true }),
    ),
    {
      minLength: 4,
      maxLength: 4,
    },
  )
  .map(
    (moves) =>
      unitSquare.map(([x, y], i) => [x * 1000 + moves[i]![0], y * 1000 + moves[i]![1]]) as unknown as Corners,
  )
  .filter(isConvex);

// OpenCV's module is a thenable that resolves to itself: it must never be awaited or returned.
const cv: typeof import('@techstark/opencv-js') = createRequire(import.meta.url)('@techstark/opencv-js');
beforeAll(async () => {
  if (!cv.Mat) await new Promise<void>((done) => Object.assign(cv, { onRuntimeInitialized: () => done() }));
});

describe('homography', () => {
  // Worked values: the direct linear transform in double precision, computed apart from this program.
  const corners: Corners = [
    [0, 0],
    [1920, 120],
    [1700, 1080],
    [160, 960],
  ];
  it('gives the worked matrix for a bent picture', () => {
    const expected = [
      1861.81818182, 198.78787879, 0, 116.36363636, 1192.72727273, 0, -0.03030303, 0.24242424, 1,
    ];
    for (const [i, value] of homographyTo(corners).entries()) expect(value).toBeCloseTo(expected[i]!, 7);
  });

  it('takes the middle and a quarter point where the worked example says', () => {
    const h = homographyTo(corners);
    expect(applyHomography(h, [0.5, 0.5])[0]).toBeCloseTo(931.5068, 4);
    expect(applyHomography(h, [0.5, 0.5])[1]).toBeCloseTo(591.7808, 4);
    expect(applyHomography(h, [0.25, 0.75])[0]).toBeCloseTo(523.3548, 4);
    expect(applyHomography(h, [0.25, 0.75])[1]).toBeCloseTo(786.5806, 4);
  });

  it('agrees with getPerspectiveTransform of OpenCV on random convex quads to 1e-6', () => {
    fc.assert(
      fc.property(quads, (to) => {
        // OpenCV reads 32-bit floats, so ours gets the very same rounded points.
        const rounded = to.map(([x, y]) => [Math.fround(x), Math.fround(y)]) as unknown as Corners;
        const mats = [unitSquare, rounded].map((quad) => cv.matFromArray(4, 1, cv.CV_32FC2, quad.flat()));
        const matrix = cv.getPerspectiveTransform(mats[0]!, mats[1]!);
        const theirs = Array.from(matrix.data64F);
        for (const mat of [...mats, matrix]) mat.delete();
        for (const [i, value] of homographyTo(rounded).entries())
          expect(Math.abs(value - theirs[i]!) / Math.max(1, Math.abs(value))).toBeLessThan(1e-6);
      }),
      { numRuns: 500 },
    );
  });

  it('comes back by its inverse', () => {
    fc.assert(
      fc.property(quads, (to) => {
        const h = homographyTo(to);
        const [x, y] = applyHomography(invertHomography(h), applyHomography(h, [0.3, 0.8]));
        expect(x).toBeCloseTo(0.3, 6);
        expect(y).toBeCloseTo(0.8, 6);
      }),
    );
  });

  it('calls crossed and dented corners not convex', () => {
    expect(isConvex(corners)).toBe(true);
    expect(isConvex([corners[0], corners[1], corners[3], corners[2]])).toBe(false);
    expect(
      isConvex([
        [0, 0],
        [10, 0],
        [2, 2],
        [0, 10],
      ]),
    ).toBe(false);
    expect(
      isConvex([
        [0, 0],
        [10, 0],
        [20, 0],
        [0, 10],
      ]),
    ).toBe(false);
  });
});
