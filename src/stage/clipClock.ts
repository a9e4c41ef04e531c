/** How far a clip may be off before it is nudged, and before it is put to its place, seconds. */
const nudgeable = 0.25;
const nudge = 0.05;

/** What to do with a clip that is `error` seconds late (negative: early). Half a frame either way is on time. */
export const correction = (error: number, fps: number): { seek: boolean; speed: number } => {
  if (Math.abs(error) < 0.5 / fps) return { seek: false, speed: 1 };
  if (Math.abs(error) < nudgeable) return { seek: false, speed: error > 0 ? 1 + nudge : 1 - nudge };
  return { seek: true, speed: 1 };
};

/** Distance to a target on a loop of `length` seconds, the short way round: positive when the clip is late. */
export const loopError = (target: number, at: number, length: number): number => {
  const error = (((target - at) % length) + length) % length;
  return error > length / 2 ? error - length : error;
};
