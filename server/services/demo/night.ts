import type { Phase } from '#shared/api/shows';
import { newLayer } from '#shared/scene/defaults';
import { drawingFacts } from '#shared/scene/drawingFacts';
import type { DrawingName, Layer, SceneBody, Source, TakeName, Transition } from '#shared/scene/schema';
import type { Screen, VenueBody } from '#shared/venue/schema';

/** Files of the demo night by what they show. */
export const demoFiles = ['water', 'salt', 'pour', 'boathouse', 'oars', 'bottle', 'mark'] as const;
export type DemoFile = (typeof demoFiles)[number];

export const demoNames = {
  show: 'Salt & Static',
  venue: 'Boathouse 4',
  client: 'Ottergate Cider',
} as const;

/** Colours of the cider house. */
export const demoPalette = ['#04202d', '#1f9a8e', '#e58a3c', '#f4efe2'];

const screen = (
  id: string,
  name: string,
  kind: Screen['kind'],
  [width, height]: [number, number],
  centre: [number, number, number],
  yaw = 0,
): Screen => ({ id, name, kind, width, height, gain: 1, centre, yaw, tilt: 0, roll: 0 });

/** A long wooden room with water under one end. Metres. */
export const demoVenue: VenueBody = {
  ambientLux: 30,
  screens: [
    screen('back', 'Back wall', 'projection', [6, 3.375], [0, 3, 0]),
    screen('sail-l', 'Sail left', 'projection', [2.4, 2.4], [-5.2, 3.1, 1.6], 35),
    screen('sail-r', 'Sail right', 'projection', [2.4, 2.4], [5.2, 3.1, 1.6], -35),
    screen('bar', 'Bar front', 'led', [4, 0.75], [-7.5, 0.9, 7], 90),
    screen('stair', 'Stair tower', 'tv', [0.81, 1.44], [7.5, 2, 6], -90),
    screen('door', 'By the door', 'tv', [1.44, 0.81], [7.5, 2.1, 10], -90),
  ],
  groups: [
    { id: 'sails', name: 'Sails', screenIds: ['sail-l', 'sail-r'] },
    { id: 'front', name: 'Front', screenIds: ['back', 'sail-l', 'sail-r'] },
    { id: 'small', name: 'Small ones', screenIds: ['bar', 'stair', 'door'] },
  ],
};

/** The night from dusk to the last tram. */
export const demoPhases: readonly Omit<Phase, 'id' | 'position'>[] = [
  { name: 'Doors', colour: '#3f7fd0', startsAt: '21:00', energy: 2, brightness: 0.5, flashes: 0 },
  { name: 'Warm', colour: '#2ba89a', startsAt: '22:15', energy: 4, brightness: 0.7, flashes: 1 },
  { name: 'Build', colour: '#e0a13a', startsAt: '23:30', energy: 6, brightness: 0.85, flashes: 2 },
  { name: 'Peak', colour: '#e0574f', startsAt: '00:45', energy: 9, brightness: 1, flashes: 3 },
  { name: 'Comedown', colour: '#8a6fd1', startsAt: '03:00', energy: 3, brightness: 0.6, flashes: 1 },
];

export interface DemoScene {
  name: string;
  /** Place in demoPhases. */
  phase: number;
  energy: number;
  body: SceneBody;
}

type Ids = Readonly<Record<DemoFile, string>>;
let layers = 0;

const layer = (name: string, source: Source, change: Partial<Layer> = {}): Layer => {
  layers += 1;
  return { ...newLayer(source.kind, `l${layers}`), name, source, ...change };
};

const drawing = (
  name: DrawingName,
  seed: number,
  facts: { a?: number; b?: number; palette?: string[] } = {},
  change: Partial<Layer> = {},
): Layer => {
  const { title, defaults } = drawingFacts[name];
  return layer(title, { kind: 'drawing', drawing: name, seed, ...defaults, ...facts }, change);
};

const clip = (name: string, assetId: string, fitBars: number, change: Partial<Layer> = {}): Layer =>
  layer(name, { kind: 'clip', assetId, rate: 1, fitBars }, change);

const mark = (assetId: string, take: TakeName, amount: number, change: Partial<Layer> = {}): Layer =>
  layer('Mark', { kind: 'mark', assetId, take, amount, seed: 7 }, { blend: 'screen', ...change });

const words = (text: string, colour: string, change: Partial<Layer> = {}): Layer =>
  layer('Words', { kind: 'words', text, weight: 750, colour, mono: false }, change);

const place = (scale: number, x = 0, y = 0, turn = 0): Layer['place'] => ({ x, y, scale, turn });

const body = (
  list: Layer[],
  transition: Transition,
  dials: SceneBody['dials'] = [],
  ground = '#000000',
): SceneBody => ({ ground, layers: list, dials, transition });

const fade = (beats: number): Transition => ({ kind: 'crossfade', beats });
const blinds = (beats: number): Transition => ({ kind: 'slats', beats });
const cut: Transition = { kind: 'cut', beats: 0 };

const doors = (ids: Ids): DemoScene[] => [
  { name: 'Low tide', phase: 0, energy: 1, body: body([drawing('tide', 3, { a: 0.45, b: 0.7 })], fade(8)) },
  {
    name: 'Lamps on the slip',
    phase: 0,
    energy: 2,
    body: body([drawing('lanterns', 5, { a: 0.55, b: 0.5 }, { dial: 0 })], fade(8), [
      { name: 'Lamps', value: 1 },
    ]),
  },
  {
    name: 'Welcome',
    phase: 0,
    energy: 2,
    body: body(
      [
        layer(
          'Boathouse',
          { kind: 'stills', assetIds: [ids.boathouse], everyBeats: 16, seed: 2 },
          {
            pulse: { of: 'scale', amount: 0.12, beats: 8 },
          },
        ),
        words('SALT & STATIC', '#fff1d6', { place: place(0.72, 0, -0.3) }),
      ],
      fade(4),
    ),
  },
];

const warm = (ids: Ids): DemoScene[] => [
  {
    name: 'Fireflies',
    phase: 1,
    energy: 3,
    body: body([drawing('meadow', 1, { a: 0.6, b: 0.35 })], fade(8)),
  },
  {
    name: 'Water light',
    phase: 1,
    energy: 4,
    body: body(
      [
        clip('Water', ids.water, 8),
        mark(ids.mark, 'breathe', 0.4, { place: place(0.5), opacity: 0.9, blend: 'soft-light' }),
        mark(ids.mark, 'breathe', 0.4, { place: place(0.5), opacity: 0.65, dial: 0 }),
      ],
      fade(4),
      [{ name: 'Mark', value: 0.8 }],
    ),
  },
  {
    name: 'Ripple',
    phase: 1,
    energy: 5,
    body: body([drawing('ripple', 4, { a: 0.6, b: 0.55 })], fade(4)),
  },
];

const build = (ids: Ids): DemoScene[] => [
  {
    name: 'Awning',
    phase: 2,
    energy: 6,
    body: body(
      [
        drawing('awning', 2, { a: 0.35, b: 0.6 }),
        words('OTTERGATE', '#fff1d6', {
          place: place(0.8),
          blend: 'overlay',
          pulse: { of: 'scale', amount: 0.1, beats: 4 },
        }),
      ],
      blinds(4),
    ),
  },
  {
    name: 'Oars',
    phase: 2,
    energy: 6,
    body: body(
      [
        drawing('ripple', 9, { a: 0.9, b: 0.3, palette: ['#00100f', '#04373a', '#e58a3c', '#ffe2b0'] }),
        layer(
          'Stills',
          { kind: 'stills', assetIds: [ids.oars, ids.bottle, ids.boathouse], everyBeats: 8, seed: 5 },
          {
            blend: 'screen',
            opacity: 0.85,
            pulse: { of: 'scale', amount: 0.18, beats: 4 },
          },
        ),
      ],
      fade(2),
    ),
  },
  {
    name: 'Weave',
    phase: 2,
    energy: 7,
    body: body([drawing('weave', 6, { a: 0.45, b: 0.7 }, { dial: 0 })], blinds(2), [
      { name: 'Strength', value: 1 },
    ]),
  },
];

const peak = (ids: Ids): DemoScene[] => [
  {
    name: 'Searchlights',
    phase: 3,
    energy: 9,
    body: body(
      [
        drawing('searchlights', 8, { a: 0.8, b: 0.8 }),
        mark(ids.mark, 'push', 0.6, { place: place(0.62), dial: 0 }),
      ],
      cut,
      [{ name: 'Mark', value: 0.9 }],
    ),
  },
  {
    name: 'Salt',
    phase: 3,
    energy: 10,
    body: body(
      [
        drawing('slats', 3, { a: 0.6, b: 0.9, palette: ['#060a0c', '#16323c', '#7fb8c0', '#f2fbff'] }),
        clip('Salt', ids.salt, 4, { blend: 'add', opacity: 0.9 }),
      ],
      cut,
    ),
  },
];

const comedown = (ids: Ids): DemoScene[] => [
  {
    name: 'Last light',
    phase: 4,
    energy: 2,
    body: body(
      [
        clip('Pour', ids.pour, 16),
        layer(
          'Bottle',
          { kind: 'stills', assetIds: [ids.bottle], everyBeats: 32, seed: 1 },
          {
            blend: 'screen',
            fit: 'contain',
            place: place(0.9),
          },
        ),
        words('GET HOME SAFE', '#fff1d6', { place: place(0.66, 0, 0.38) }),
      ],
      fade(16),
    ),
  },
];

/** Twelve scenes over five phases: every drawing of ours, clips, stills, the mark and words. */
export function demoScenes(ids: Ids): DemoScene[] {
  layers = 0;
  return [...doors(ids), ...warm(ids), ...build(ids), ...peak(ids), ...comedown(ids)];
}
