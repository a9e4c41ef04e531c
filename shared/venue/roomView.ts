import type { Corners, OutputMap, PixelPoint, Region } from '../mapping/schema';
import { type Pinhole, project, screenCorners, sees, type Vec3 } from './pinhole';
import type { Screen } from './schema';

/** Height of a standing guest's eyes, metres (common practice, no source). */
const eyeHeight = 1.65;

/** Places in a room from which a rehearsal can be watched. */
export const viewpoints = ['floor', 'left', 'right'] as const;
export type Viewpoint = (typeof viewpoints)[number];

/** The box that holds all screens, with some floor before it. Metres. */
export interface RoomBox {
  left: number;
  right: number;
  top: number;
  back: number;
  front: number;
}

/** The room around its screens: never narrower than 6 m or lower than 3.5 m, with 7 m of floor before the last screen. */
export const roomBox = (screens: readonly Screen[]): RoomBox => {
  const points = screens.flatMap((screen) => screenCorners(screen));
  const spread = (axis: 0 | 1 | 2, least: number[]): number[] => [
    ...points.map((point) => point[axis]),
    ...least,
  ];
  const back = Math.min(...spread(2, [0]));
  return {
    left: Math.min(...spread(0, [-3])) - 0.4,
    right: Math.max(...spread(0, [3])) + 0.4,
    top: Math.max(...spread(1, [3.5])) + 0.4,
    back,
    front: Math.max(...spread(2, [0])) + 7,
  };
};

const sideways: Record<Viewpoint, number> = { floor: 0, left: -0.55, right: 0.55 };

/** The eye at a viewpoint: looks at the middle of the back wall. Field of view by a throw ratio of 0.72 (69.5° wide). */
export const eyeAt = (viewpoint: Viewpoint, box: RoomBox, raster: readonly [number, number]): Pinhole => {
  const x = ((box.right - box.left) / 2) * sideways[viewpoint] + (box.left + box.right) / 2;
  const z = box.front;
  const middle: Vec3 = [(box.left + box.right) / 2, box.top * 0.45, box.back];
  return {
    position: [x, eyeHeight, z],
    yaw: (Math.atan2(middle[0] - x, z - middle[2]) * 180) / Math.PI,
    pitch: (Math.atan2(middle[1] - eyeHeight, Math.hypot(z - middle[2], middle[0] - x)) * 180) / Math.PI,
    roll: 0,
    throwRatio: 0.72,
    lensShift: [0, 0],
    raster,
  };
};

/**
 * What the eye sees as an output map: one region a screen, through the same homography that displays use.
 * Screens behind the eye, or seen from the back, are left out.
 */
export const viewMap = (screens: readonly Screen[], eye: Pinhole): OutputMap => ({
  raster: [Math.round(eye.raster[0]), Math.round(eye.raster[1])],
  regions: screens
    .filter((screen) => sees(eye.position, screen))
    .flatMap((screen): Region[] => {
      const corners = screenCorners(screen).map((corner) => project(eye, corner));
      if (corners.some((corner) => corner === null)) return [];
      return [
        {
          id: screen.id,
          screenId: screen.id,
          name: screen.name,
          source: { x: 0, y: 0, w: 1, h: 1 },
          corners: corners as PixelPoint[] as unknown as Corners,
          brightness: 1,
        },
      ];
    }),
});

/** Edges of the room as lines on the eye's raster, for the ones it can see. Pixels. */
export const roomLines = (box: RoomBox, eye: Pinhole): [PixelPoint, PixelPoint][] => {
  const near = box.front - 1.5;
  const corner = (x: 'left' | 'right', y: 0 | 1, z: number): Vec3 => [box[x], y * box.top, z];
  const edges: [Vec3, Vec3][] = [
    [corner('left', 0, box.back), corner('right', 0, box.back)],
    [corner('left', 1, box.back), corner('right', 1, box.back)],
    [corner('left', 0, box.back), corner('left', 1, box.back)],
    [corner('right', 0, box.back), corner('right', 1, box.back)],
    ...(['left', 'right'] as const).flatMap((side): [Vec3, Vec3][] => [
      [corner(side, 0, box.back), corner(side, 0, near)],
      [corner(side, 1, box.back), corner(side, 1, near)],
    ]),
  ];
  return edges.flatMap(([a, b]): [PixelPoint, PixelPoint][] => {
    const [from, to] = [project(eye, a), project(eye, b)];
    return from && to ? [[from, to]] : [];
  });
};

/** Screens that the eye does not see, drawn flat in a row along the foot of the picture so that none goes unwatched. */
export const withUnseen = (map: OutputMap, screens: readonly Screen[]): OutputMap => {
  const [width, height] = map.raster;
  const unseen = screens.filter((screen) => !map.regions.some((region) => region.screenId === screen.id));
  const tall = height * 0.14;
  let x = width * 0.02;
  const flat = unseen.map((screen): Region => {
    const wide = (tall * screen.width) / screen.height;
    const [left, right, top, foot] = [x, x + wide, height * 0.84, height * 0.84 + tall];
    x = right + width * 0.015;
    return {
      id: screen.id,
      screenId: screen.id,
      name: screen.name,
      source: { x: 0, y: 0, w: 1, h: 1 },
      corners: [
        [left, top],
        [right, top],
        [right, foot],
        [left, foot],
      ],
      brightness: 1,
    };
  });
  return { ...map, regions: [...map.regions, ...flat] };
};
