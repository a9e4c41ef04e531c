import { z } from 'zod';
import { idSchema } from '../scene/schema';

/** A point of a display's raster in pixels: x right, y down, may lie outside the raster. */
export const pixelPointSchema = z.tuple([
  z.number().min(-20000).max(20000),
  z.number().min(-20000).max(20000),
]);
export type PixelPoint = z.infer<typeof pixelPointSchema>;

/** Corners in the order top left, top right, bottom right, bottom left, as the audience sees them. */
export const cornersSchema = z.tuple([
  pixelPointSchema,
  pixelPointSchema,
  pixelPointSchema,
  pixelPointSchema,
]);
export type Corners = z.infer<typeof cornersSchema>;

export const regionSchema = z.object({
  id: idSchema,
  /** Screen whose picture the region takes. */
  screenId: idSchema,
  name: z.string().min(1).max(60),
  /** Part of the screen's picture, as shares 0..1 from its top left. */
  source: z.object({
    x: z.number().min(0).max(1),
    y: z.number().min(0).max(1),
    w: z.number().min(0.001).max(1),
    h: z.number().min(0.001).max(1),
  }),
  corners: cornersSchema,
  /** Light of this region: 0..1. */
  brightness: z.number().min(0).max(1),
});
export type Region = z.infer<typeof regionSchema>;

export const outputMapSchema = z.object({
  /** The raster the corners were set in, in pixels; drawn scaled when the display's differs. */
  raster: z.tuple([z.number().int().min(16).max(16384), z.number().int().min(16).max(16384)]),
  regions: z.array(regionSchema).max(64),
});
export type OutputMap = z.infer<typeof outputMapSchema>;
