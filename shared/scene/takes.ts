import { chance, wander } from './noise';
import type { TakeName } from './schema';

/** Where a take puts a mark: offset as a share of the screen, scale, turn in radians clockwise. */
export interface TakePose {
  x: number;
  y: number;
  scale: number;
  turn: number;
}

type Take = (beat: number, amount: number, seed: number) => TakePose;

const tau = Math.PI * 2;
const rest: TakePose = { x: 0, y: 0, scale: 1, turn: 0 };
/** From 1 at each whole beat down to 0, softly. */
const knock = (beat: number): number => Math.exp(-4 * (beat - Math.floor(beat)));

/** Motions like a hand and a camera. All are pure in beat, amount (0..1) and seed, and keep the mark's proportions. */
const takes: Record<TakeName, Take> = {
  still: () => rest,
  'drift in': (beat, amount, seed) => {
    // Sixteen beats from a little off and small to the middle, then it stays and floats.
    const t = Math.min(1, Math.max(0, beat / 16));
    const ease = 1 - (1 - t) ** 3;
    const side = chance(seed, 1) < 0.5 ? -1 : 1;
    return {
      x: side * 0.35 * amount * (1 - ease) + 0.015 * amount * wander(beat / 8, seed),
      y: 0.015 * amount * wander(beat / 8, seed + 7),
      scale: 1 - 0.35 * amount * (1 - ease),
      turn: 0,
    };
  },
  'hand shake': (beat, amount, seed) => ({
    x: 0.03 * amount * wander(beat * 1.3, seed),
    y: 0.03 * amount * wander(beat * 1.1, seed + 3),
    scale: 1 + 0.03 * amount * wander(beat / 3, seed + 5),
    turn: 0.06 * amount * wander(beat * 0.9, seed + 11),
  }),
  push: (beat, amount) => ({ ...rest, scale: 1 + 0.18 * amount * knock(beat) }),
  swing: (beat, amount, seed) => {
    // Hangs from its top edge: one swing in four beats.
    const turn = 0.16 * amount * Math.sin((tau * beat) / 4 + tau * chance(seed));
    return { x: -0.3 * Math.sin(turn), y: 0.3 * (1 - Math.cos(turn)), scale: 1, turn };
  },
  breathe: (beat, amount) => ({ ...rest, scale: 1 + 0.06 * amount * Math.sin((tau * beat) / 8) }),
};

/** The pose of a take at a beat. */
export const takePose = (take: TakeName, beat: number, amount: number, seed: number): TakePose =>
  takes[take](beat, amount, seed);
