import { z } from 'zod';

/** RFC 9457 problem details: what went wrong, where, and how to mend it. */
export const problemSchema = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number().int(),
  /** What happened, in a sentence. */
  detail: z.string(),
  /** What to do now, in a sentence. */
  mend: z.string(),
  /** Fields at fault, by path such as `body.layers.0.opacity`. */
  fields: z.array(z.object({ path: z.string(), message: z.string() })).default([]),
  /** Id under which the server logged it. */
  id: z.string().optional(),
});
export type Problem = z.infer<typeof problemSchema>;
