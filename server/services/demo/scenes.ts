import { newLayer } from '#shared/scene/defaults';
import { drawingFacts } from '#shared/scene/drawingFacts';
import type { DrawingName, Layer, SceneBody, Source, TakeName, Transition } from '#shared/scene/schema';
import { type DemoFile, type DemoFileIds, demoRecipes } from './demoFiles';

export interface DemoScene {
  name: string;
  /** Place in demoPhases. */
  phase: number;
  energy: number;
  body: SceneBody;
}

type Change = Partial<Omit<Layer, 'id' | 'name' | 'source'>>;
/** A layer before it has its id, which is its place in the scene. */
type Draft = (id: string) => Layer;

const layer =
  (name: string, source: Source, change: Change = {}): Draft =>
  (id) => ({ ...newLayer(source.kind, id), name, source, ...change });

interface Look {
  a?: number;
  b?: number;
  palette?: [ground: string, deep: string, main: string, bright: string];
}

const drawing = (name: DrawingName, seed: number, look: Look = {}, change: Change = {}): Draft =>
  layer(
    drawingFacts[name].title,
    { kind: 'drawing', drawing: name, seed, ...drawingFacts[name].defaults, ...look },
    change,
  );

const words = (text: string, colour: string, change: Change = {}, weight = 750): Draft =>
  layer('Words', { kind: 'words', text, weight, colour, mono: false }, change);

const place = (scale: number, x = 0, y = 0, turn = 0): Layer['place'] => ({ x, y, scale, turn });
const breath = (of: 'opacity' | 'scale', amount: number, beats: 1 | 2 | 4 | 8): Layer['pulse'] => ({
  of,
  amount,
  beats,
});
const fade = (beats: number): Transition => ({ kind: 'crossfade', beats });
const blinds = (beats: number): Transition => ({ kind: 'slats', beats });
const cut: Transition = { kind: 'cut', beats: 0 };

const body = (
  transition: Transition,
  layers: readonly Draft[],
  dials: SceneBody['dials'] = [],
  ground = '#000000',
): SceneBody => ({ ground, layers: layers.map((make, at) => make(`l${at + 1}`)), dials, transition });

/** Layers that show files of the demo night. */
const filesOf = (ids: DemoFileIds) => ({
  clip: (file: DemoFile, fitBars: number, change?: Change): Draft =>
    layer(demoRecipes[file].name, { kind: 'clip', assetId: ids[file], rate: 1, fitBars }, change),
  stills: (files: readonly DemoFile[], everyBeats: number, change?: Change): Draft =>
    layer(
      'Pictures',
      { kind: 'stills', assetIds: files.flatMap((file) => ids[file] ?? []), everyBeats, seed: 5 },
      change,
    ),
  mark: (take: TakeName, amount: number, change?: Change): Draft =>
    layer('Mark', { kind: 'mark', assetId: ids.mark, take, amount, seed: 7 }, change),
});

type Files = ReturnType<typeof filesOf>;
const cream = '#fff1d6';
const amber = '#f0a040';

const doors = ({ stills, mark, clip }: Files): DemoScene[] => [
  {
    name: 'Low tide',
    phase: 0,
    energy: 1,
    body: body(fade(8), [
      drawing('tide', 3, { a: 0.45, b: 0.75 }),
      words('Salt & Static', cream, { place: place(0.34, 0, -0.22), opacity: 0.9 }, 300),
    ]),
  },
  {
    name: 'Lamps on the slip',
    phase: 0,
    energy: 2,
    body: body(
      fade(8),
      [drawing('lanterns', 5, { a: 0.6, b: 0.5 }, { dial: 0 })],
      [{ name: 'Lamps', value: 1 }],
    ),
  },
  {
    name: 'Boathouse',
    phase: 0,
    energy: 2,
    body: body(
      fade(8),
      [
        stills(['boathouse'], 16),
        clip('water', 8, { blend: 'screen', opacity: 0.5, dial: 0 }),
        mark('breathe', 0.3, { place: place(0.34, -0.32, -0.2), opacity: 0.9, dial: 1 }),
      ],
      [
        { name: 'Water', value: 0.6 },
        { name: 'Mark', value: 1 },
      ],
    ),
  },
];

const warm = ({ clip, mark }: Files): DemoScene[] => [
  {
    name: 'Fireflies',
    phase: 1,
    energy: 3,
    body: body(fade(8), [drawing('meadow', 1, { a: 0.75, b: 0.4 })]),
  },
  {
    name: 'Water light',
    phase: 1,
    energy: 4,
    body: body(
      fade(4),
      [clip('water', 4), mark('drift in', 0.6, { place: place(0.62), blend: 'screen', dial: 0 })],
      [{ name: 'Mark', value: 0.9 }],
    ),
  },
];

const build = ({ stills, mark }: Files): DemoScene[] => [
  {
    name: 'Awning',
    phase: 2,
    energy: 6,
    body: body(blinds(4), [
      drawing('awning', 2, { a: 0.35, b: 0.6, palette: ['#0f0705', '#5a1f12', '#d9622e', '#ffe2b8'] }),
      mark('swing', 0.5, { place: place(0.66), blend: 'screen' }),
    ]),
  },
  {
    name: 'Orchard',
    phase: 2,
    energy: 5,
    body: body(fade(2), [
      stills(['bough', 'oars', 'boathouse'], 8, { pulse: breath('scale', 0.1, 4) }),
      drawing(
        'meadow',
        9,
        { a: 0.35, b: 0.2, palette: ['#000000', '#000000', '#000000', amber] },
        {
          blend: 'screen',
        },
      ),
    ]),
  },
  {
    name: 'Net loft',
    phase: 2,
    energy: 7,
    body: body(
      blinds(2),
      [
        drawing('weave', 6, { a: 0.4, b: 0.7, palette: ['#02070a', '#0a3a40', '#1f9a8e', '#ffe2b8'] }),
        words('OTTERGATE', cream, {
          place: place(0.84),
          blend: 'difference',
          pulse: breath('scale', 0.12, 4),
          dial: 0,
        }),
      ],
      [{ name: 'Name', value: 0.9 }],
    ),
  },
];

const peak = ({ clip, mark }: Files): DemoScene[] => [
  {
    name: 'Harbour lights',
    phase: 3,
    energy: 9,
    body: body(
      cut,
      [
        drawing('searchlights', 8, { a: 0.8, b: 0.8 }),
        clip('static', 2, { blend: 'add', opacity: 0.55, dial: 1 }),
        mark('push', 0.6, { place: place(0.66), dial: 0 }),
      ],
      [
        { name: 'Mark', value: 1 },
        { name: 'Static', value: 0.7 },
      ],
    ),
  },
  {
    name: 'Salt',
    phase: 3,
    energy: 10,
    body: body(
      cut,
      [
        clip('salt', 2),
        drawing(
          'slats',
          3,
          { a: 0.5, b: 0.9, palette: ['#04070a', '#10262e', '#6fb3bd', '#f2fbff'] },
          {
            blend: 'overlay',
            opacity: 0.85,
            dial: 0,
          },
        ),
        words(
          'SALT',
          '#ffffff',
          { place: place(0.92), blend: 'difference', pulse: breath('scale', 0.16, 2) },
          800,
        ),
      ],
      [{ name: 'Slats', value: 1 }],
    ),
  },
  {
    name: 'Static',
    phase: 3,
    energy: 9,
    body: body(blinds(1), [
      drawing('ripple', 9, { a: 0.9, b: 0.35, palette: ['#0a0302', '#3a130a', amber, '#fff1d6'] }),
      clip('static', 2, { blend: 'add' }),
      words(
        'STATIC',
        '#e07a3c',
        { place: place(0.86), blend: 'add', opacity: 0.9, pulse: breath('opacity', 0.5, 2) },
        800,
      ),
    ]),
  },
];

const comedown = ({ clip, mark }: Files): DemoScene[] => [
  {
    name: 'Last pour',
    phase: 4,
    energy: 2,
    body: body(fade(16), [
      clip('pour', 16, { opacity: 0.45 }),
      mark('breathe', 0.4, { place: place(0.54, 0, -0.12), opacity: 0.95 }),
      words('Get home safe', cream, { place: place(0.24, 0, 0.34) }, 500),
    ]),
  },
];

/** Twelve scenes over five phases: every drawing of ours, clips, stills, the mark and words. */
export function demoScenes(ids: DemoFileIds): DemoScene[] {
  const files = filesOf(ids);
  return [doors, warm, build, peak, comedown].flatMap((make) => make(files));
}
