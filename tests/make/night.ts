import type { Phase } from '#shared/api/shows';
import type { DisplayStatus, Manifest, Vitals } from '#shared/protocol/messages';
import type { DrawingName, Scene } from '#shared/scene/schema';
import type { Screen, ScreenGroup } from '#shared/venue/schema';

/** A screen on the back wall, 2 × 1 m, 2 m up, `x` metres to house right. */
export const makeScreen = (id: string, x: number, change: Partial<Screen> = {}): Screen => ({
  id,
  name: id,
  kind: 'projection',
  width: 2,
  height: 1,
  gain: 1,
  centre: [x, 2, 0],
  yaw: 0,
  tilt: 0,
  roll: 0,
  ...change,
});

/** A scene of one drawing with one dial, cut in. */
export const makeScene = (
  id: string,
  phaseId: string | null,
  drawing: DrawingName = 'meadow',
  change: Partial<Scene> = {},
): Scene => ({
  id,
  showId: 'show-1',
  name: id,
  phaseId,
  energy: 5,
  position: 0,
  version: 1,
  body: {
    ground: '#000000',
    layers: [
      {
        id: 'layer-1',
        name: 'Ground',
        on: true,
        source: {
          kind: 'drawing',
          drawing,
          seed: 1,
          palette: ['#071411', '#14382b', '#d3f84b', '#f4ffd0'],
          a: 0.5,
          b: 0.5,
        },
        opacity: 1,
        blend: 'normal',
        fit: 'cover',
        place: { x: 0, y: 0, scale: 1, turn: 0 },
        pulse: null,
        dial: 0,
      },
    ],
    dials: [{ name: 'Glow', value: 0.5 }],
    transition: { kind: 'cut', beats: 0 },
  },
  ...change,
});

export const makePhase = (id: string, position: number, change: Partial<Phase> = {}): Phase => ({
  id,
  name: id,
  colour: '#2ba89a',
  startsAt: '22:00',
  energy: 5,
  brightness: 1,
  flashes: 3,
  position,
  ...change,
});

export const makeManifest = (screens: Screen[], scenes: Scene[]): Manifest => ({
  revision: 'r1',
  showName: 'Salt & Static',
  screens,
  scenes,
  assets: [],
});

export const makeDisplay = (displayId: string, connected = true): DisplayStatus => ({
  displayId,
  connected,
  lastSeenAt: 1_000_000,
  vitals: null,
  changedAt: null,
  simulated: false,
});

/** Vitals of a display that does well. */
export const makeVitals = (displayId: string, change: Partial<Vitals> = {}): Vitals => ({
  displayId,
  fps: 60,
  longestMs: 17,
  clockErrorMs: 1,
  linkMs: 4,
  filesOnBoard: 0,
  filesWanted: 0,
  raster: [1280, 720],
  visible: true,
  fullscreen: true,
  awake: true,
  still: false,
  changes: 0,
  upS: 1,
  trouble: null,
  ...change,
});

/** A small night: three screens in one group of two, Peak and Comedown, three scenes. */
export const smallNight = () => {
  const screens = [makeScreen('left', -4), makeScreen('back', 0), makeScreen('right', 4)];
  const scenes = [
    makeScene('Meadow', 'peak', 'meadow', { position: 0 }),
    makeScene('Awning', 'peak', 'awning', { position: 1 }),
    makeScene('Tide', 'down', 'tide', { position: 2 }),
  ];
  const phases = [makePhase('peak', 0, { name: 'Peak' }), makePhase('down', 1, { name: 'Comedown' })];
  const groups: ScreenGroup[] = [{ id: 'sails', name: 'Sails', screenIds: ['left', 'right'] }];
  return { manifest: makeManifest(screens, scenes), phases, groups };
};
