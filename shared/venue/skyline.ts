import type { Screen, VenueBody } from './schema';

/** Height of the people drawn to scale, metres (about the mean of grown guests; no source). */
export const personHeightM = 1.75;

/** Free floor between two columns of the strip, metres: room for one person to stand in. */
const gapM = 1;
/** Two screens belong to the same wall when they face within this many degrees of each other. */
const sameWallDegrees = 30;
/** … and their planes are no further apart than this, metres. */
const sameWallDepthM = 2.5;

/** One screen on the strip: left edge, lower edge above the floor, true width and height. Metres. */
export interface SkylineItem {
  screenId: string;
  x: number;
  y: number;
  width: number;
  height: number;
}

/** The room unrolled. Metres; x runs from house left to house right, y up from the floor. */
export interface Skyline {
  items: SkylineItem[];
  length: number;
  height: number;
  /** Where people stand on the floor line. */
  people: number[];
}

interface Placed {
  screen: Screen;
  angle: number;
  width: number;
  height: number;
  bottom: number;
}

interface Column {
  members: Placed[];
  left: number;
  width: number;
}

const radians = (degrees: number): number => (degrees * Math.PI) / 180;

/** Width and height of the upright box round a screen that is rolled in its own plane. */
const boxOf = ({ width, height, roll }: Screen): { width: number; height: number } => {
  const c = Math.abs(Math.cos(radians(roll)));
  const s = Math.abs(Math.sin(radians(roll)));
  return { width: width * c + height * s, height: width * s + height * c };
};

/** Middle of the floor: halfway between the outermost screens, and never behind the back wall. */
const middleOf = (screens: readonly Screen[]): { x: number; z: number } => {
  const xs = screens.map((screen) => screen.centre[0]);
  const zs = screens.map((screen) => screen.centre[2]);
  const back = Math.min(...zs);
  const front = Math.max(...zs);
  // All on one wall: step away from it, or every angle would be a right one.
  const depth = Math.max(front - back, 2);
  return { x: (Math.min(...xs) + Math.max(...xs)) / 2, z: back + depth / 2 };
};

const place = (screen: Screen, middle: { x: number; z: number }): Placed => {
  const box = boxOf(screen);
  const [x, y, z] = screen.centre;
  return {
    screen,
    // 0 looks at the back wall, left is negative, right positive, ±180° behind.
    angle: Math.atan2(x - middle.x, middle.z - z),
    ...box,
    bottom: y - box.height / 2,
  };
};

const turnBetween = (a: number, b: number): number => Math.abs(((((a - b) % 360) + 540) % 360) - 180);

/** Distance between two parallel screens, across the wall that `a` hangs on. */
const depthBetween = (a: Screen, b: Screen): number => {
  const yaw = radians(a.yaw);
  return Math.abs((b.centre[0] - a.centre[0]) * Math.sin(yaw) + (b.centre[2] - a.centre[2]) * Math.cos(yaw));
};

/** How far `b` lies to house right of `a` along the wall of `a`, as seen from the floor. */
const along = (a: Screen, b: Screen): number => {
  const yaw = radians(a.yaw);
  return (b.centre[0] - a.centre[0]) * Math.cos(yaw) - (b.centre[2] - a.centre[2]) * Math.sin(yaw);
};

/** True when one hangs over the other on the same wall, so that both fit at the same x. */
const stacked = (a: Placed, b: Placed): boolean =>
  turnBetween(a.screen.yaw, b.screen.yaw) <= sameWallDegrees &&
  depthBetween(a.screen, b.screen) <= sameWallDepthM &&
  Math.abs(along(a.screen, b.screen)) < (a.width + b.width) / 2 &&
  (a.bottom + a.height <= b.bottom + 1e-6 || b.bottom + b.height <= a.bottom + 1e-6);

const toColumns = (placed: readonly Placed[]): Column[] => {
  const groups: Placed[][] = [];
  for (const one of placed) {
    const home = groups.find((members) => members.every((other) => stacked(other, one)));
    if (home) home.push(one);
    else groups.push([one]);
  }
  return groups.map((members) => {
    const [first] = members;
    const spans = members.map((one) => {
      const centre = first ? along(first.screen, one.screen) : 0;
      return [centre - one.width / 2, centre + one.width / 2] as const;
    });
    const left = Math.min(...spans.map(([from]) => from));
    return { members, left, width: Math.max(...spans.map(([, to]) => to)) - left };
  });
};

/**
 * Unrolls a room into one strip, in true size and height: screens in the order in which a person on the
 * middle of the floor sees them from house left by the back wall to house right. Screens that hang over
 * each other on one wall share their place; all others stand apart, so nothing overlaps.
 */
export const unroll = (venue: Pick<VenueBody, 'screens'>): Skyline => {
  if (venue.screens.length === 0) return { items: [], length: 0, height: 0, people: [] };
  const middle = middleOf(venue.screens);
  const placed = venue.screens
    .map((screen) => place(screen, middle))
    .sort((a, b) => a.angle - b.angle || a.screen.centre[0] - b.screen.centre[0]);

  const items: SkylineItem[] = [];
  const people: number[] = [];
  let x = 0;
  for (const column of toColumns(placed)) {
    if (x > 0) people.push(x - gapM / 2);
    const [first] = column.members;
    for (const one of column.members) {
      const centre = first ? along(first.screen, one.screen) : 0;
      items.push({
        screenId: one.screen.id,
        x: x + centre - one.width / 2 - column.left,
        y: one.bottom,
        width: one.width,
        height: one.height,
      });
    }
    x += column.width + gapM;
  }
  const top = Math.max(...items.map((item) => item.y + item.height));
  return { items, length: x - gapM, height: Math.max(top, personHeightM), people };
};
