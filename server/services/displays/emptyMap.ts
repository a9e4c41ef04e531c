import type { OutputMap } from '#shared/mapping/schema';

/** What a display shows before anybody has lined it up: nothing. */
export const emptyMap = (raster: [number, number]): OutputMap => ({
  raster: [clamp(raster[0]), clamp(raster[1])],
  regions: [],
});

const clamp = (side: number): number => Math.min(16384, Math.max(16, Math.round(side)));
