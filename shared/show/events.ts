import { z } from 'zod';
import { outputMapSchema } from '../mapping/schema';
import { idSchema } from '../scene/schema';
import { beatClockSchema, hubMsSchema, sceneRunSchema } from './state';

const bodies = [
  z.object({ kind: z.literal('scene.fired'), screenIds: z.array(idSchema), run: sceneRunSchema }),
  z.object({ kind: z.literal('scene.recalled'), screenIds: z.array(idSchema) }),
  z.object({ kind: z.literal('phase.changed'), phaseId: idSchema.nullable() }),
  z.object({ kind: z.literal('beat.changed'), beat: beatClockSchema }),
  z.object({ kind: z.literal('dimmer.changed'), level: z.number().min(0).max(1) }),
  z.object({ kind: z.literal('blackout.changed'), on: z.boolean() }),
  z.object({ kind: z.literal('calm.changed'), on: z.boolean() }),
  z.object({ kind: z.literal('freeze.changed'), on: z.boolean() }),
  z.object({
    kind: z.literal('dial.changed'),
    screenIds: z.array(idSchema),
    dial: z.number().int().min(0).max(3),
    value: z.number().min(0).max(1),
  }),
  z.object({ kind: z.literal('lineup.changed'), displayId: idSchema, on: z.boolean() }),
  z.object({ kind: z.literal('display.identified'), displayId: idSchema, until: hubMsSchema }),
  /** A new version of a display's map was saved. */
  z.object({
    kind: z.literal('map.saved'),
    displayId: idSchema,
    version: z.number().int(),
    map: outputMapSchema,
  }),
] as const;

export const eventBodySchema = z.discriminatedUnion('kind', bodies);
export type EventBody = z.infer<typeof eventBodySchema>;
export type EventKind = EventBody['kind'];

export const showEventSchema = z.object({
  epoch: z.number().int().min(0),
  revision: z.number().int().min(1),
  /** Hub time of the stamp. */
  at: hubMsSchema,
  /** Command it came from; null when the server made it. */
  commandId: idSchema.nullable(),
  /** User or display that asked; null for the server. */
  by: idSchema.nullable(),
  body: eventBodySchema,
});
export type ShowEvent = z.infer<typeof showEventSchema>;
