import { z } from 'zod';
import { outputMapSchema } from '../mapping/schema';
import { idSchema } from '../scene/schema';

export const displaySchema = z.object({
  id: idSchema,
  showId: idSchema,
  name: z.string(),
  /** Raster it last reported, in pixels. */
  raster: z.tuple([z.number().int(), z.number().int()]).nullable(),
  joinedAt: z.string(),
  lastSeenAt: z.string().nullable(),
  mapVersion: z.number().int(),
  map: outputMapSchema,
});
export type Display = z.infer<typeof displaySchema>;

/** A joining code in two spoken parts: a word and four digits, such as MOTH 2741. */
export const pairingCodeSchema = z
  .string()
  .trim()
  .toUpperCase()
  .transform((text) => text.replace(/[\s-]+/g, ' '))
  .pipe(z.string().regex(/^[A-Z]{4} \d{4}$/, 'A word of four letters and four digits, as on the display.'));

export const askPairingSchema = z.object({ raster: z.tuple([z.number().int(), z.number().int()]) });
export const pairingSchema = z.object({
  code: z.string(),
  /** Never shown; the display polls with it. */
  deviceSecret: z.string(),
  /** ISO time. */
  expiresAt: z.string(),
  /** Least time between polls, ms. */
  intervalMs: z.number(),
});
export const waitPairingSchema = z.object({ deviceSecret: z.string().regex(/^[A-Za-z0-9_-]{40,64}$/) });
/** On `joined` the answer also sets the device cookie. */
export const pairingStateSchema = z.object({
  state: z.enum(['pending', 'slow-down', 'expired', 'joined']),
  displayId: idSchema.nullable(),
});

/** Step one: what waits under that code. */
export const lookUpPairingSchema = z.object({ code: pairingCodeSchema });
export const pairingDetailsSchema = z.object({
  code: z.string(),
  raster: z.tuple([z.number().int(), z.number().int()]),
  address: z.string(),
  browser: z.string(),
});
/** Step two: take it. */
export const joinDisplaySchema = z.object({
  code: pairingCodeSchema,
  showId: idSchema,
  name: z.string().trim().min(1).max(40),
});
export const editDisplaySchema = z.object({ name: z.string().trim().min(1).max(40) });

export const mapVersionSchema = z.object({
  version: z.number().int(),
  at: z.string(),
  by: z.string().nullable(),
  note: z.string(),
  map: outputMapSchema,
});
export type MapVersion = z.infer<typeof mapVersionSchema>;
export const saveMapSchema = z.object({ map: outputMapSchema, note: z.string().trim().max(120).default('') });

/** What the display page learns about itself. */
export const selfSchema = z.object({ displayId: idSchema, showId: idSchema, name: z.string() });
