import type { PixelPoint } from '../mapping/schema';
import type { Screen } from './schema';

/** Metres in the room: x to house right, y up, z from the back wall towards the audience. */
export type Vec3 = readonly [number, number, number];

/** Something that sees, or throws, a picture through one point. */
export interface Pinhole {
  position: Vec3;
  /** Degrees; 0 looks towards −z, positive towards house right. */
  yaw: number;
  /** Degrees; positive looks up. */
  pitch: number;
  /** Degrees, clockwise as seen from behind it. */
  roll: number;
  /** Distance divided by the picture's width there. */
  throwRatio: number;
  /** Moves the picture by this share of its width (right) and height (up). */
  lensShift: readonly [number, number];
  /** Pixels: width and height. */
  raster: readonly [number, number];
}

interface Frame {
  right: Vec3;
  up: Vec3;
  forward: Vec3;
}

const radians = (degrees: number): number => (degrees * Math.PI) / 180;
const add = (a: Vec3, b: Vec3): Vec3 => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
const sub = (a: Vec3, b: Vec3): Vec3 => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
const times = (a: Vec3, k: number): Vec3 => [a[0] * k, a[1] * k, a[2] * k];
const dot = (a: Vec3, b: Vec3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

/** a·cos(angle) + b·sin(angle): one vector of a pair turned in their plane. */
const turn = (a: Vec3, b: Vec3, angle: number): Vec3 =>
  add(times(a, Math.cos(angle)), times(b, Math.sin(angle)));

/** Yaw, then pitch, then roll, applied to a frame that looks along `forward`. */
const turned = (frame: Frame, yaw: number, pitch: number, roll: number): Frame => {
  const [p, r] = [radians(pitch), radians(roll)];
  const forward1 = turn(frame.forward, frame.right, radians(yaw));
  const right1 = turn(frame.right, times(frame.forward, -1), radians(yaw));
  const forward = turn(forward1, frame.up, p);
  const up1 = turn(frame.up, times(forward1, -1), p);
  return { forward, right: turn(right1, times(up1, -1), r), up: turn(up1, right1, r) };
};

const pinholeFrame = (hole: Pinhole): Frame =>
  turned({ right: [1, 0, 0], up: [0, 1, 0], forward: [0, 0, -1] }, hole.yaw, hole.pitch, hole.roll);

/** A screen's axes as its audience sees it; `forward` is the way its face looks. */
export const screenFrame = (screen: Pick<Screen, 'yaw' | 'tilt' | 'roll'>): Frame => {
  // The face looks towards +z and its right hand is the audience's, so a turn towards +x is a turn towards `right`.
  return turned(
    { right: [1, 0, 0], up: [0, 1, 0], forward: [0, 0, 1] },
    screen.yaw,
    screen.tilt,
    screen.roll,
  );
};

/** Corners of a screen in the room, metres: top left, top right, bottom right, bottom left as its audience sees it. */
export const screenCorners = (screen: Screen): [Vec3, Vec3, Vec3, Vec3] => {
  const { right, up } = screenFrame(screen);
  const at = (x: number, y: number): Vec3 =>
    add(screen.centre, add(times(right, (x * screen.width) / 2), times(up, (y * screen.height) / 2)));
  return [at(-1, 1), at(1, 1), at(1, -1), at(-1, -1)];
};

/**
 * Where a point of the room falls on a pinhole's raster: pixels, x right and y down as the audience sees the picture.
 * null when the point is less than `near` metres in front of it.
 */
export const project = (hole: Pinhole, point: Vec3, near = 0.05): PixelPoint | null => {
  const { right, up, forward } = pinholeFrame(hole);
  const ray = sub(point, hole.position);
  const depth = dot(ray, forward);
  if (depth < near) return null;
  const [width, height] = hole.raster;
  const x = (dot(ray, right) / depth) * hole.throwRatio - hole.lensShift[0];
  const y = (dot(ray, up) / depth) * hole.throwRatio * (width / height) - hole.lensShift[1];
  return [(x + 0.5) * width, (0.5 - y) * height];
};

/** Whether an eye at `position` is in front of a screen's face. */
export const sees = (position: Vec3, screen: Screen): boolean =>
  dot(sub(position, screen.centre), screenFrame(screen).forward) > 0;
