import { z } from 'zod';
import { outputMapSchema } from '../mapping/schema';
import { idSchema, sceneSchema } from '../scene/schema';
import { commandSchema } from '../show/commands';
import { showEventSchema } from '../show/events';
import { hubMsSchema, showStateSchema } from '../show/state';
import { screenSchema } from '../venue/schema';

/** A file that displays fetch ahead. */
export const manifestAssetSchema = z.object({
  id: idSchema,
  kind: z.enum(['clip', 'still', 'mark']),
  /** Path on the hub, named after the content's hash. */
  url: z.string(),
  bytes: z.number().int(),
  width: z.number().int(),
  height: z.number().int(),
  /** Seconds; null for pictures. */
  durationS: z.number().nullable(),
  fps: z.number().nullable(),
});
export type ManifestAsset = z.infer<typeof manifestAssetSchema>;

/** All that a page needs to draw a show. */
export const manifestSchema = z.object({
  /** Hash of the content: the same manifest has the same revision. */
  revision: z.string(),
  showName: z.string(),
  screens: z.array(screenSchema),
  scenes: z.array(sceneSchema),
  assets: z.array(manifestAssetSchema),
});
export type Manifest = z.infer<typeof manifestSchema>;

/** How a display does, once a second. */
export const vitalsSchema = z.object({
  displayId: idSchema,
  /** Frames drawn in the last second. */
  fps: z.number().min(0).max(1000),
  /** Longest gap between frames of the last second, ms. */
  longestMs: z.number().min(0),
  /** Estimated offset uncertainty of the hub clock (half the least delay), ms. */
  clockErrorMs: z.number().nullable(),
  /** Round trip to the hub, ms. */
  linkMs: z.number().nullable(),
  filesOnBoard: z.number().int().min(0),
  filesWanted: z.number().int().min(0),
  raster: z.tuple([z.number().int(), z.number().int()]),
  visible: z.boolean(),
  fullscreen: z.boolean(),
  awake: z.boolean(),
  /** True while frames are drawn but nothing on them may change (freeze, blackout, a still). */
  still: z.boolean(),
  /** Counts up whenever a read-back differs from the one before. */
  changes: z.number().int().min(0),
  /** Seconds since the page started. */
  upS: z.number().min(0),
  trouble: z.string().max(120).nullable(),
});
export type Vitals = z.infer<typeof vitalsSchema>;

/** A run that a display has drawn on a screen. */
export const drawnSchema = z.object({
  displayId: idSchema,
  screenId: idSchema,
  /** null: the screen went empty. */
  runId: idSchema.nullable(),
  sceneId: idSchema.nullable(),
  sceneVersion: z.number().int().nullable(),
  /** Hub time of the first frame that showed it. */
  at: hubMsSchema,
  /** Frame's hub time minus landsAt, ms. */
  lateMs: z.number(),
  /** Made by the display; counts up, so that a repeat is known. */
  seq: z.number().int().min(0),
});
export type Drawn = z.infer<typeof drawnSchema>;

/** A small true picture of what a display drew of one screen. */
export const pictureSchema = z.object({
  displayId: idSchema,
  screenId: idSchema,
  at: hubMsSchema,
  /** image/webp, base64. */
  data: z
    .string()
    .max(40_000)
    .regex(/^[A-Za-z0-9+/=]*$/),
});
export type Picture = z.infer<typeof pictureSchema>;

export const helloSchema = z.object({
  type: z.literal('hello'),
  protocol: z.number().int(),
  /** Last word the page has: it gets only what is newer when that is possible. */
  epoch: z.number().int().nullable(),
  revision: z.number().int().nullable(),
});

export const toHubSchema = z.discriminatedUnion('type', [
  helloSchema,
  /** Four-timestamp clock: t1 = sender's own monotonic ms. */
  z.object({ type: z.literal('time'), t1: z.number() }),
  z.object({ type: z.literal('command'), command: commandSchema }),
  z.object({ type: z.literal('vitals'), vitals: vitalsSchema }),
  z.object({ type: z.literal('drawn'), drawn: z.array(drawnSchema).min(1).max(64) }),
  z.object({ type: z.literal('picture'), picture: pictureSchema }),
]);
export type ToHub = z.infer<typeof toHubSchema>;

/** Closed list of reasons why the hub says no; words.ts turns each into five words or fewer. */
export const refusalCodes = [
  'expired',
  'not-allowed',
  'unknown-scene',
  'unknown-screen',
  'unknown-phase',
  'unknown-display',
  'show-closed',
  'bad-command',
  'too-many',
  'shutting-down',
] as const;
export type RefusalCode = (typeof refusalCodes)[number];

/** One display as the crew sees it. */
export const displayStatusSchema = z.object({
  displayId: idSchema,
  connected: z.boolean(),
  /** Hub time of its last word. */
  lastSeenAt: hubMsSchema.nullable(),
  vitals: vitalsSchema.nullable(),
  /** Hub time at which its pictures last changed. */
  changedAt: hubMsSchema.nullable(),
  simulated: z.boolean(),
});
export type DisplayStatus = z.infer<typeof displayStatusSchema>;

/** What is on the wall, from drawn frames. */
export const onWallSchema = z.object({
  displayId: idSchema,
  screenId: idSchema,
  runId: idSchema.nullable(),
  at: hubMsSchema,
});
export type OnWall = z.infer<typeof onWallSchema>;

export const fromHubSchema = z.discriminatedUnion('type', [
  z.object({
    type: z.literal('welcome'),
    protocol: z.number().int(),
    /** Who the hub takes the page for. */
    principal: z.enum(['lead', 'vj', 'operator', 'assistant', 'display']),
    displayId: idSchema.nullable(),
    state: showStateSchema,
    manifest: manifestSchema,
    /** Saved maps by display id: its own for a display, all of the show's for the crew. */
    maps: z.record(idSchema, outputMapSchema),
    displayNames: z.record(idSchema, z.string()),
    displays: z.array(displayStatusSchema),
    wall: z.array(onWallSchema),
    mode: z.enum(['plan', 'live', 'closed']),
    hubNow: hubMsSchema,
    /** False while the database is away and events go to the spill file. */
    durable: z.enum(['database', 'spill', 'none']),
  }),
  /** Same epoch and a small gap: only what was missed. */
  z.object({ type: z.literal('resume'), events: z.array(showEventSchema), hubNow: hubMsSchema }),
  z.object({ type: z.literal('time'), t1: z.number(), t2: hubMsSchema, t3: hubMsSchema }),
  z.object({ type: z.literal('beat'), hubNow: hubMsSchema }),
  z.object({ type: z.literal('event'), event: showEventSchema }),
  /** Passed on at once, stored nowhere. */
  z.object({ type: z.literal('draft'), displayId: idSchema, map: outputMapSchema, by: idSchema.nullable() }),
  z.object({ type: z.literal('reload'), displayId: idSchema }),
  z.object({ type: z.literal('manifest'), manifest: manifestSchema }),
  z.object({
    type: z.literal('displays'),
    displays: z.array(displayStatusSchema),
    names: z.record(idSchema, z.string()),
  }),
  z.object({ type: z.literal('wall'), wall: z.array(onWallSchema) }),
  z.object({ type: z.literal('picture'), picture: pictureSchema }),
  z.object({ type: z.literal('mode'), mode: z.enum(['plan', 'live', 'closed']) }),
  z.object({ type: z.literal('durable'), durable: z.enum(['database', 'spill', 'none']) }),
  /** Taken: `revision` is null for transient commands and for a repeat of an id. */
  z.object({
    type: z.literal('taken'),
    commandId: idSchema,
    revision: z.number().int().nullable(),
    landsAt: hubMsSchema.nullable(),
  }),
  /** Kept: the event survives a crash of the hub. `kept: false` says it does not. */
  z.object({ type: z.literal('kept'), commandId: idSchema, kept: z.boolean() }),
  z.object({
    type: z.literal('refused'),
    commandId: idSchema,
    code: z.enum(refusalCodes),
    words: z.string(),
  }),
  /** The display's drawn reports up to this number are in the as-run log. */
  z.object({ type: z.literal('logged'), displayId: idSchema, seq: z.number().int() }),
]);
export type FromHub = z.infer<typeof fromHubSchema>;
export type Welcome = Extract<FromHub, { type: 'welcome' }>;
