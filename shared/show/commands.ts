import { z } from 'zod';
import { outputMapSchema } from '../mapping/schema';
import { idSchema, transitionSchema } from '../scene/schema';
import { beatSources, hubMsSchema } from './state';

export const landsOnValues = ['now', 'beat', 'bar', '4 bars'] as const;
export const landsOnSchema = z.enum(landsOnValues);
export type LandsOn = z.infer<typeof landsOnSchema>;

const bodies = [
  z.object({
    kind: z.literal('scene.trigger'),
    screenIds: z.array(idSchema).min(1).max(32),
    sceneId: idSchema,
    landsOn: landsOnSchema,
    /** Overrides the scene's own transition. */
    transition: transitionSchema.optional(),
  }),
  /** Takes back what was sent and has not landed. */
  z.object({ kind: z.literal('scene.recall'), screenIds: z.array(idSchema).min(1).max(32) }),
  z.object({ kind: z.literal('phase.set'), phaseId: idSchema }),
  z.object({
    kind: z.literal('beat.set'),
    bpm: z.number().min(20).max(300),
    /** Hub time and the beat position then; both null keep the phase. */
    at: hubMsSchema.nullable(),
    beat: z.number().nullable(),
    source: z.enum(beatSources),
  }),
  z.object({ kind: z.literal('beat.nudge'), ms: z.number().min(-500).max(500) }),
  /** “This is the one”: the nearest beat becomes the first of a bar. */
  z.object({ kind: z.literal('beat.one'), at: hubMsSchema }),
  z.object({ kind: z.literal('beat.scale'), factor: z.union([z.literal(2), z.literal(0.5)]) }),
  z.object({ kind: z.literal('dimmer.set'), level: z.number().min(0).max(1) }),
  z.object({ kind: z.literal('blackout.set'), on: z.boolean() }),
  z.object({ kind: z.literal('calm.set'), on: z.boolean() }),
  z.object({ kind: z.literal('freeze.set'), on: z.boolean() }),
  z.object({
    kind: z.literal('dial.set'),
    screenIds: z.array(idSchema).min(1).max(32),
    dial: z.number().int().min(0).max(3),
    value: z.number().min(0).max(1),
  }),
  z.object({ kind: z.literal('lineup.set'), displayId: idSchema, on: z.boolean() }),
  z.object({ kind: z.literal('display.identify'), displayId: idSchema }),
  z.object({ kind: z.literal('display.reload'), displayId: idSchema }),
  /** A map while it is being dragged: goes to the display, is never stored. */
  z.object({ kind: z.literal('map.draft'), displayId: idSchema, map: outputMapSchema }),
] as const;

export const commandBodySchema = z.discriminatedUnion('kind', bodies);
export type CommandBody = z.infer<typeof commandBodySchema>;
export type CommandKind = CommandBody['kind'];
export const commandKinds = bodies.map((body) => body.shape.kind.value) as CommandKind[];

export const commandSchema = z.object({
  /** Made by the sender, one a press; the same id twice is applied once. */
  id: idSchema,
  /** Hub time after which it must not fire. */
  expiresAt: hubMsSchema,
  body: commandBodySchema,
});
export type Command = z.infer<typeof commandSchema>;

/** Commands that are passed on and forgotten: no revision, no journal. */
export const transientKinds: ReadonlySet<CommandKind> = new Set(['map.draft', 'display.reload']);
