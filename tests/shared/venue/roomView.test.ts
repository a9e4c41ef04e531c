import { describe, expect, it } from 'vitest';
import { eyeAt, roomBox, viewMap } from '#shared/venue/roomView';
import { screenSchema } from '#shared/venue/schema';

const screen = (id: string, centre: [number, number, number], yaw: number) =>
  screenSchema.parse({
    id,
    name: id,
    kind: 'projection',
    width: 4,
    height: 2,
    centre,
    yaw,
    tilt: 0,
    roll: 0,
  });
const back = screen('back', [0, 3, 0], 0);
const raster = [960, 540] as const;

describe('view of a room', () => {
  it('shows a back wall upright and level with the middle of the picture between its sides', () => {
    const { regions } = viewMap([back], eyeAt('floor', roomBox([back]), raster));
    const [tl, tr, br, bl] = regions[0]!.corners;
    expect(tl[0] + tr[0]).toBeCloseTo(raster[0], 6);
    expect(tl[1]).toBeCloseTo(tr[1], 6);
    expect(br[1]).toBeGreaterThan(tr[1]);
    expect(bl[0]).toBeLessThan(br[0]);
  });

  it('leaves out a screen that faces away', () => {
    const away = screen('away', [0, 3, 2], 180);
    expect(
      viewMap([back, away], eyeAt('floor', roomBox([back, away]), raster)).regions.map((region) => region.id),
    ).toEqual(['back']);
  });

  it('makes the nearer end of a side wall the taller one', () => {
    const side = screen('side', [-4, 2, 3], 90);
    const { regions } = viewMap([side], eyeAt('floor', roomBox([back, side]), raster));
    const [tl, tr, br, bl] = regions[0]!.corners;
    // A wall on house left faces house right: its audience's left end is the one nearer to the eye.
    expect(bl[1] - tl[1]).toBeGreaterThan(br[1] - tr[1]);
  });
});
