import { z } from 'zod';
import { idSchema } from '../scene/schema';

/** How the making of the demo night goes: the answer of GET and POST /api/demo. */
export const demoProgressSchema = z.object({
  state: z.enum(['none', 'working', 'ready', 'failed']),
  /** Share of the work done, 0..1. */
  progress: z.number().min(0).max(1),
  /** What is being made, or why it failed, in a sentence. */
  words: z.string(),
  /** The demo show once it can be opened. */
  showId: idSchema.nullable(),
});
export type DemoProgress = z.infer<typeof demoProgressSchema>;
