import type { Corners, OutputMap } from './schema';

/** A rectangle's corners. Pixels. */
export const rectangle = (x: number, y: number, width: number, height: number): Corners => [
  [x, y],
  [x + width, y],
  [x + width, y + height],
  [x, y + height],
];

/** The whole raster. */
export const wholeRaster = ([width, height]: OutputMap['raster']): Corners => rectangle(0, 0, width, height);

/** A map with one screen's picture over the whole raster. */
export const wholeMap = (screenId: string, raster: OutputMap['raster']): OutputMap => ({
  raster,
  regions: [
    {
      id: 'whole',
      screenId,
      name: 'whole',
      source: { x: 0, y: 0, w: 1, h: 1 },
      corners: wholeRaster(raster),
      brightness: 1,
    },
  ],
});
