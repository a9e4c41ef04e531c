import { z } from 'zod';
import { idSchema, transitionSchema } from '../scene/schema';

/** Milliseconds of the hub clock: near Unix time, never runs backwards, the same on every page after clock sync. */
export const hubMsSchema = z.number().finite();

/** The two rooms a show has. What happens in `rehearsal` never reaches a joined display. */
export const roomKinds = ['live', 'rehearsal'] as const;
export const roomKindSchema = z.enum(roomKinds);
export type RoomKind = z.infer<typeof roomKindSchema>;

/** A scene asked for on a screen. It is on air from `landsAt`. */
export const sceneRunSchema = z.object({
  runId: idSchema,
  sceneId: idSchema,
  version: z.number().int().min(1),
  seed: z.number().int().min(0),
  /** Hub time of the trigger's stamp. */
  firedAt: hubMsSchema,
  landsAt: hubMsSchema,
  /** Position of the beat clock at landsAt, so that the scene's own beat 0 stays put when the tempo changes. */
  landsAtBeat: z.number(),
  transition: transitionSchema,
  /** Length of the transition in ms, fixed when it was stamped. */
  transitionMs: z.number().min(0),
  dials: z.array(z.number().min(0).max(1)).max(4),
});
export type SceneRun = z.infer<typeof sceneRunSchema>;

export const screenRunSchema = z.object({
  /** What was there before `current`; drawn while its transition runs. */
  previous: sceneRunSchema.nullable(),
  current: sceneRunSchema.nullable(),
  /** Sent, lands in the future (or has landed since the last event: see settle). */
  next: sceneRunSchema.nullable(),
});
export type ScreenRun = z.infer<typeof screenRunSchema>;

export const beatSources = ['typed', 'tap', 'line-in', 'midi'] as const;
export const beatClockSchema = z.object({
  bpm: z.number().min(20).max(300),
  /** A moment and the beat position then: beat(t) = beat + (t − at)·bpm/60000. Beat 0, 4, 8 … begin a bar. */
  at: hubMsSchema,
  beat: z.number(),
  source: z.enum(beatSources),
});
export type BeatClock = z.infer<typeof beatClockSchema>;

/** A switch and since when, so that every page fades it alike. */
export const switchSchema = z.object({ on: z.boolean(), at: hubMsSchema });
export type Switch = z.infer<typeof switchSchema>;

export const showStateSchema = z.object({
  showId: idSchema,
  room: roomKindSchema,
  epoch: z.number().int().min(0),
  revision: z.number().int().min(0),
  /** Hub time of the last event. */
  at: hubMsSchema,
  phaseId: idSchema.nullable(),
  screens: z.record(idSchema, screenRunSchema),
  beat: beatClockSchema,
  /** Overall level, 0..1. */
  dimmer: z.number().min(0).max(1),
  blackout: switchSchema,
  calm: switchSchema,
  freeze: switchSchema,
  /** Displays that show the line-up grid. */
  lineUp: z.array(idSchema),
  /** Display that shows its name large until the given hub time. */
  identify: z.record(idSchema, hubMsSchema),
});
export type ShowState = z.infer<typeof showStateSchema>;
