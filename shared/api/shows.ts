import { z } from 'zod';
import { colourSchema, idSchema, sceneBodySchema, sceneSchema } from '../scene/schema';
import { venueBodySchema } from '../venue/schema';

export const phaseSchema = z.object({
  id: idSchema,
  name: z.string().trim().min(1).max(24),
  colour: colourSchema,
  /** Planned start as HH:MM of the night (after midnight belongs to the show's date). */
  startsAt: z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/),
  energy: z.number().int().min(1).max(10),
  /** Ceiling of the level, 0..1. */
  brightness: z.number().min(0).max(1),
  /** Flashes a second allowed, 0..3. */
  flashes: z.number().min(0).max(3),
  position: z.number().int(),
});
export type Phase = z.infer<typeof phaseSchema>;
export const phasesSchema = z.array(phaseSchema).min(1).max(12);

const dateSchema = z.string().regex(/^\d{4}-\d{2}-\d{2}$/, 'A date as YYYY-MM-DD.');
export const showSchema = z.object({
  id: idSchema,
  name: z.string(),
  date: dateSchema,
  mode: z.enum(['plan', 'live', 'closed']),
  venueId: idSchema.nullable(),
  venueName: z.string().nullable(),
  brandId: idSchema.nullable(),
  brandName: z.string().nullable(),
  client: z.string(),
  /** Added to drawn time so that picture and sound meet, ms. */
  pictureDelayMs: z.number(),
  openedAt: z.string().nullable(),
  closedAt: z.string().nullable(),
  sceneCount: z.number().int(),
  displayCount: z.number().int(),
});
export type Show = z.infer<typeof showSchema>;

export const showDetailSchema = showSchema.extend({
  phases: z.array(phaseSchema),
  venue: z.object({ id: idSchema, name: z.string(), body: venueBodySchema }).nullable(),
});
export type ShowDetail = z.infer<typeof showDetailSchema>;

export const newShowSchema = z.object({
  name: z.string().trim().min(1).max(60),
  date: dateSchema,
  venueId: idSchema.nullable(),
  brandId: idSchema.nullable().default(null),
  client: z.string().trim().max(60).default(''),
});
/** What is left out stays as it is: so without the defaults of a new show. */
export const editShowSchema = newShowSchema
  .extend({ brandId: idSchema.nullable(), client: z.string().trim().max(60) })
  .partial();
export const cloneShowSchema = z.object({ name: z.string().trim().min(1).max(60), date: dateSchema });

export const venueSchema = z.object({ id: idSchema, name: z.string(), body: venueBodySchema });
export type Venue = z.infer<typeof venueSchema>;
export const editVenueSchema = z.object({ name: z.string().trim().min(1).max(60), body: venueBodySchema });

export const brandSchema = z.object({
  id: idSchema,
  name: z.string(),
  palette: z.array(colourSchema).max(8),
  markAssetId: idSchema.nullable(),
});
export type Brand = z.infer<typeof brandSchema>;
export const editBrandSchema = z.object({
  name: z.string().trim().min(1).max(60),
  palette: z.array(colourSchema).max(8),
  markAssetId: idSchema.nullable(),
});

export const newSceneSchema = z.object({
  name: z.string().trim().min(1).max(60),
  phaseId: idSchema.nullable(),
  energy: z.number().int().min(1).max(10),
  body: sceneBodySchema,
});
/** Saving makes a new version; 409 when `expectedVersion` is no longer the newest. */
export const saveSceneSchema = newSceneSchema.extend({ expectedVersion: z.number().int().min(1) });
export const sceneVersionSchema = z.object({
  version: z.number().int(),
  at: z.string(),
  by: z.string().nullable(),
});
export type SceneVersion = z.infer<typeof sceneVersionSchema>;
export const scenesSchema = z.array(sceneSchema);

export const asRunSchema = z.object({
  displayId: idSchema,
  displayName: z.string(),
  screenId: idSchema,
  sceneId: idSchema.nullable(),
  sceneName: z.string().nullable(),
  at: z.number(),
  lateMs: z.number(),
});
export type AsRun = z.infer<typeof asRunSchema>;
