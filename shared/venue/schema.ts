import { z } from 'zod';
import { idSchema } from '../scene/schema';

const metres = z.number().min(-500).max(500);
const size = z.number().min(0.05).max(200);
const degrees = z.number().min(-360).max(360);

/** A physical thing that guests look at. Metres and degrees; x to house right, y up, z from the back wall to the audience. */
export const screenSchema = z.object({
  id: idSchema,
  name: z.string().trim().min(1).max(40),
  kind: z.enum(['projection', 'led', 'tv']),
  width: size,
  height: size,
  gain: z.number().min(0.05).max(10).default(1),
  centre: z.tuple([metres, metres, metres]),
  yaw: degrees,
  tilt: degrees,
  roll: degrees,
});
export type Screen = z.infer<typeof screenSchema>;

/** A choice of screens that is fired as one, such as “Sails”. */
export const screenGroupSchema = z.object({
  id: idSchema,
  name: z.string().trim().min(1).max(40),
  screenIds: z.array(idSchema).min(1).max(32),
});
export type ScreenGroup = z.infer<typeof screenGroupSchema>;

export const venueBodySchema = z.object({
  ambientLux: z.number().min(0).max(100_000).default(30),
  screens: z.array(screenSchema).max(32),
  groups: z.array(screenGroupSchema).max(16),
});
export type VenueBody = z.infer<typeof venueBodySchema>;
