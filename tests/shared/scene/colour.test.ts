import Color from 'colorjs.io';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { calmBody } from '#shared/scene/calm';
import { rgbOf } from '#shared/scene/colour';
import { drawingFacts } from '#shared/scene/drawingFacts';
import { colourSchema, drawingNames, sceneBodySchema } from '#shared/scene/schema';

/** Relative luminance of sRGB shares (IEC 61966-2-1, as WCAG 2.2 defines it). */
const luminance = (rgb: readonly number[]): number => {
  const [r = 0, g = 0, b = 0] = rgb.map((value) =>
    value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4,
  );
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
};

describe('colours', () => {
  it('reads #rrggbb as colorjs.io does', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 0xffffff }), (value) => {
        const text = `#${value.toString(16).padStart(6, '0')}`;
        const theirs = new Color(text);
        for (const [i, share] of rgbOf(text).entries())
          expect(share).toBeCloseTo(Number(theirs.coords[i]), 12);
        // colorjs.io weighs with more digits than WCAG prints.
        expect(luminance(rgbOf(text))).toBeCloseTo(theirs.luminance, 3);
      }),
    );
  });

  it.each([
    // Printed values after IEC 61966-2-1: grey 128 and 188, and the three primaries.
    ['#808080', 0.2159],
    ['#bcbcbc', 0.5029],
    ['#ff0000', 0.2126],
    ['#00ff00', 0.7152],
    ['#0000ff', 0.0722],
  ])('has the luminance of %s', (text, wanted) => {
    expect(luminance(rgbOf(text))).toBeCloseTo(wanted, 4);
  });
});

describe('shipped palettes', () => {
  it.each(drawingNames)('stands on a dark ground and rises to a bright end: %s', (name) => {
    const { palette } = drawingFacts[name].defaults;
    for (const colour of palette) expect(colourSchema.safeParse(colour).success).toBe(true);
    const [ground = 1, deep = 0, main = 0, bright = 0] = palette.map((colour) => luminance(rgbOf(colour)));
    expect(ground).toBeLessThan(0.02);
    expect(deep).toBeGreaterThan(ground);
    expect(main).toBeGreaterThan(deep);
    expect(bright).toBeGreaterThan(main);
  });

  it('is a calm look that the schema takes, dim and slow', () => {
    expect(sceneBodySchema.parse(calmBody)).toEqual(calmBody);
    for (const layer of calmBody.layers) expect([layer.pulse, layer.opacity <= 0.6]).toEqual([null, true]);
  });
});
