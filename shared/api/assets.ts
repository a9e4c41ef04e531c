import { z } from 'zod';
import { idSchema } from '../scene/schema';

export const assetStates = ['waiting', 'working', 'ready', 'failed'] as const;
export const assetSchema = z.object({
  id: idSchema,
  name: z.string(),
  kind: z.enum(['clip', 'still', 'mark']),
  state: z.enum(assetStates),
  /** Share of the work done, 0..1. */
  progress: z.number().min(0).max(1),
  /** Why it failed, in a sentence; null otherwise. */
  fault: z.string().nullable(),
  bytes: z.number().int(),
  width: z.number().int().nullable(),
  height: z.number().int().nullable(),
  durationS: z.number().nullable(),
  fps: z.number().nullable(),
  /** Served file, named after its hash; null until ready. */
  url: z.string().nullable(),
  posterUrl: z.string().nullable(),
  addedAt: z.string(),
  addedBy: z.string().nullable(),
  /** Scenes that use it. */
  uses: z.array(z.object({ sceneId: idSchema, sceneName: z.string(), showId: idSchema })),
});
export type Asset = z.infer<typeof assetSchema>;
export const editAssetSchema = z.object({
  name: z.string().trim().min(1).max(120).optional(),
  kind: z.enum(['clip', 'still', 'mark']).optional(),
});

/** Limits of one upload, in bytes, pixels and seconds. */
export const uploadLimits = {
  image: 25 * 1024 * 1024,
  video: 2 * 1024 * 1024 * 1024,
  pixels: 50_000_000,
  videoPixels: 9_000_000,
  seconds: 30 * 60,
} as const;
