import { z } from 'zod';

/** Short id made by a client or the server: letters, digits, - and _. */
export const idSchema = z.string().regex(/^[A-Za-z0-9_-]{1,64}$/);

/** A colour as #rrggbb in sRGB. */
export const colourSchema = z.string().regex(/^#[0-9a-f]{6}$/);

/** W3C Compositing and Blending Level 1 separable modes, and `add` (its "plus-lighter"). */
export const blendModes = [
  'normal',
  'add',
  'multiply',
  'screen',
  'overlay',
  'darken',
  'lighten',
  'color-dodge',
  'color-burn',
  'hard-light',
  'soft-light',
  'difference',
  'exclusion',
] as const;
export const blendModeSchema = z.enum(blendModes);
export type BlendMode = z.infer<typeof blendModeSchema>;

export const fits = ['cover', 'contain', 'stretch'] as const;
export type Fit = (typeof fits)[number];

/** Our own drawings. Each is a GLSL function in src/stage/drawings and a row of drawingFacts. */
export const drawingNames = [
  'meadow',
  'searchlights',
  'awning',
  'ripple',
  'slats',
  'tide',
  'lanterns',
  'weave',
] as const;
export const drawingNameSchema = z.enum(drawingNames);
export type DrawingName = z.infer<typeof drawingNameSchema>;

/** Motions of a mark. Pure functions of beat, seed and amount in takes.ts. */
export const takeNames = ['still', 'drift in', 'hand shake', 'push', 'swing', 'breathe'] as const;
export const takeNameSchema = z.enum(takeNames);
export type TakeName = z.infer<typeof takeNameSchema>;

export const transitionKinds = ['cut', 'crossfade', 'slats'] as const;
export const transitionSchema = z.object({
  kind: z.enum(transitionKinds),
  /** Length in beats; ignored by `cut`. */
  beats: z.number().min(0).max(32),
});
export type Transition = z.infer<typeof transitionSchema>;
export type TransitionKind = (typeof transitionKinds)[number];

const clipSchema = z.object({
  kind: z.literal('clip'),
  assetId: idSchema.nullable(),
  /** Playing speed; ignored when fitBars is set. */
  rate: z.number().min(0.1).max(4),
  /** Bars the whole clip lasts, so that it turns with the beat; null plays at `rate`. */
  fitBars: z.number().int().min(1).max(64).nullable(),
});
const stillsSchema = z.object({
  kind: z.literal('stills'),
  assetIds: z.array(idSchema).max(200),
  everyBeats: z.number().min(1).max(64),
  seed: z.number().int().min(0).max(0xffff_ffff),
});
const markSchema = z.object({
  kind: z.literal('mark'),
  assetId: idSchema.nullable(),
  take: takeNameSchema,
  amount: z.number().min(0).max(1),
  seed: z.number().int().min(0).max(0xffff_ffff),
});
const wordsSchema = z.object({
  kind: z.literal('words'),
  text: z.string().max(200),
  weight: z.number().int().min(200).max(800),
  colour: colourSchema,
  mono: z.boolean(),
});
const drawingSchema = z.object({
  kind: z.literal('drawing'),
  drawing: drawingNameSchema,
  seed: z.number().int().min(0).max(0xffff_ffff),
  palette: z.array(colourSchema).length(4),
  /** Two parameters; what they mean is in drawingFacts. 0..1. */
  a: z.number().min(0).max(1),
  b: z.number().min(0).max(1),
});
export const sourceSchema = z.discriminatedUnion('kind', [
  clipSchema,
  stillsSchema,
  markSchema,
  wordsSchema,
  drawingSchema,
]);
export type Source = z.infer<typeof sourceSchema>;
export type SourceKind = Source['kind'];

export const layerSchema = z.object({
  id: idSchema,
  name: z.string().min(1).max(60),
  on: z.boolean(),
  source: sourceSchema,
  opacity: z.number().min(0).max(1),
  blend: blendModeSchema,
  fit: z.enum(fits),
  /** Centre offset as a share of the screen (x right, y down), scale, and turn in degrees clockwise. */
  place: z.object({
    x: z.number().min(-2).max(2),
    y: z.number().min(-2).max(2),
    scale: z.number().min(0.01).max(10),
    turn: z.number().min(-360).max(360),
  }),
  /** Moves softly with the beat. Never shorter than one beat, so at most 2.92 a second at 175 bpm. */
  pulse: z
    .object({
      of: z.enum(['opacity', 'scale']),
      amount: z.number().min(0).max(1),
      beats: z.union([z.literal(1), z.literal(2), z.literal(4), z.literal(8)]),
    })
    .nullable(),
  /** Dial (0..3) that scales the layer's opacity, or null. */
  dial: z.number().int().min(0).max(3).nullable(),
});
export type Layer = z.infer<typeof layerSchema>;

/** What a scene draws: the part of a scene that is versioned. */
export const sceneBodySchema = z.object({
  ground: colourSchema,
  /** Back to front. */
  layers: z.array(layerSchema).max(8),
  dials: z.array(z.object({ name: z.string().min(1).max(24), value: z.number().min(0).max(1) })).max(4),
  transition: transitionSchema,
});
export type SceneBody = z.infer<typeof sceneBodySchema>;

export const sceneSchema = z.object({
  id: idSchema,
  showId: idSchema,
  name: z.string().trim().min(1).max(60),
  phaseId: idSchema.nullable(),
  energy: z.number().int().min(1).max(10),
  position: z.number().int(),
  version: z.number().int().min(1),
  body: sceneBodySchema,
});
export type Scene = z.infer<typeof sceneSchema>;
