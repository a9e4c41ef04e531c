import { describe, expect, it } from 'vitest';
import { type Pinhole, project, screenCorners, sees } from '#shared/venue/pinhole';
import { screenSchema } from '#shared/venue/schema';

// A worked room, computed apart from this program with the pinhole model of Hartley & Zisserman, ch. 6 (from memory).
const screens = [
  {
    id: 'back',
    name: 'Back wall',
    kind: 'projection',
    width: 6,
    height: 3.3,
    gain: 1,
    centre: [0, 3.55, 0],
    yaw: 0,
    tilt: 0,
    roll: 0,
  },
  {
    id: 'sail-left',
    name: 'Sail left',
    kind: 'projection',
    width: 2.3,
    height: 2.1,
    gain: 0.9,
    centre: [-4.4, 3.2, 0.9],
    yaw: 25,
    tilt: -8,
    roll: 3,
  },
  {
    id: 'booth',
    name: 'Booth',
    kind: 'projection',
    width: 3,
    height: 0.95,
    gain: 1,
    centre: [0, 0.85, 1.2],
    yaw: 0,
    tilt: 0,
    roll: 0,
  },
].map((screen) => screenSchema.parse(screen));
const projectors: Record<string, Pinhole> = {
  left: {
    raster: [1920, 1080],
    throwRatio: 1.2,
    lensShift: [0, 0],
    position: [-1.6, 4.6, 8.2],
    yaw: -4,
    pitch: -9,
    roll: 1,
  },
  right: {
    raster: [1920, 1200],
    throwRatio: 1.25,
    lensShift: [0.1, -0.2],
    position: [2.2, 4.7, 8],
    yaw: 6,
    pitch: -5,
    roll: -2,
  },
};
const expected: Record<string, Record<string, number[][]>> = {
  left: {
    back: [
      [715.571, 6.086],
      [2500.766, -34.412],
      [2419.598, 919.187],
      [745.489, 911.406],
    ],
    'sail-left': [
      [-128.939, 296.113],
      [625.562, 307.669],
      [600.198, 882.996],
      [-101.03, 937.641],
    ],
    booth: [
      [1154.646, 1203.836],
      [2118.506, 1216.662],
      [2100.201, 1497.281],
      [1155.812, 1477.027],
    ],
  },
  right: {
    back: [
      [-1181.908, -82.386],
      [768.377, -1.403],
      [735.001, 966.581],
      [-1144.486, 967.93],
    ],
    'sail-left': [
      [-2672.427, 200.111],
      [-1389.897, 256.851],
      [-1383.248, 936.675],
      [-2585.382, 1018.338],
    ],
    booth: [
      [-851.936, 1317.531],
      [249.564, 1301.036],
      [244.402, 1612.355],
      [-843.783, 1643.101],
    ],
  },
};

describe('pinhole', () => {
  for (const [id, hole] of Object.entries(projectors))
    for (const screen of screens)
      it(`puts ${screen.name} on the raster of projector ${id} within 0.001 px of the worked room`, () => {
        const corners = screenCorners(screen).map((corner) => project(hole, corner));
        for (const [i, corner] of corners.entries()) {
          expect(Math.abs((corner?.[0] ?? 0) - expected[id]![screen.id]![i]![0]!)).toBeLessThan(0.001);
          expect(Math.abs((corner?.[1] ?? 0) - expected[id]![screen.id]![i]![1]!)).toBeLessThan(0.001);
        }
      });

  it('does not project what lies behind it', () => {
    expect(project(projectors.left!, [0, 2, 20])).toBeNull();
  });

  it('sees a screen only from in front of its face', () => {
    expect(sees([0, 1.7, 8], screens[0]!)).toBe(true);
    expect(sees([0, 1.7, -1], screens[0]!)).toBe(false);
  });
});
