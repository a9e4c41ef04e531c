import type { OutputMap } from '#shared/mapping/schema';
import { rgbOf } from '#shared/scene/colour';
import { drawingFacts } from '#shared/scene/drawingFacts';
import type { DrawItem, DrawList, DrawSource, Rgb, ScreenFrame } from '#shared/scene/drawingList';
import type { DrawingName } from '#shared/scene/schema';
import { createFileStore } from '@/stage/fileStore';
import { pictureData } from '@/stage/pictureData';
import { createStage } from '@/stage/stage';
import type { LoadedFile, Stage, StageInput } from '@/stage/types';

/** What the page offers to checks; they run its functions inside the browser. */
const files = new Map<string, LoadedFile>();

/** Makes a stage on a canvas of its own. */
const open = (width: number, height: number): { canvas: HTMLCanvasElement; stage: Stage } => {
  const canvas = document.createElement('canvas');
  Object.assign(canvas, { width, height });
  document.body.replaceChildren(canvas);
  const stage = createStage(canvas, { get: (id) => files.get(id) ?? null });
  stage.resize(width, height);
  return { canvas, stage };
};

/** A further stage on a canvas that had one. */
const stageOn = (canvas: HTMLCanvasElement): Stage =>
  createStage(canvas, { get: (id) => files.get(id) ?? null });

const place = { x: 0, y: 0, scale: 1, turn: 0 };

const layer = (source: DrawSource, more: Partial<DrawItem> = {}): DrawItem => ({
  key: 'run/layer',
  source,
  opacity: 1,
  blend: 'normal',
  fit: 'stretch',
  place,
  ...more,
});

const drawing = (name: DrawingName, beat: number, bpm = 126, more: Partial<DrawItem> = {}): DrawItem => {
  const { a, b, palette } = drawingFacts[name].defaults;
  return layer(
    {
      kind: 'drawing',
      drawing: name,
      seed: 41.7,
      palette: palette.map(rgbOf),
      a,
      b,
      beat,
      timeS: (beat * 60) / bpm,
    },
    more,
  );
};

const frame = (over: DrawList, more: Partial<ScreenFrame> = {}): ScreenFrame => ({
  screenId: 'wall',
  under: null,
  over,
  transition: null,
  runId: 'run',
  level: 1,
  ...more,
});

const list = (items: DrawItem[], ground: Rgb = [0, 0, 0]): DrawList => ({ ground, items });

const wholeMap = (width: number, height: number): OutputMap => ({
  raster: [width, height],
  regions: [
    {
      id: 'whole',
      screenId: 'wall',
      name: 'Wall',
      source: { x: 0, y: 0, w: 1, h: 1 },
      corners: [
        [0, 0],
        [width, 0],
        [width, height],
        [0, height],
      ],
      brightness: 1,
    },
  ],
});

const input = (
  width: number,
  height: number,
  frames: ScreenFrame[],
  more: Partial<StageInput> = {},
): StageInput => ({
  frames,
  map: wholeMap(width, height),
  screenSizes: { wall: { width, height } },
  hubNow: 0,
  paused: false,
  lineUp: false,
  label: null,
  ...more,
});

/** RGBA of a canvas, top row first; to be read in the task that drew. */
const pixels = (canvas: HTMLCanvasElement): Uint8ClampedArray => {
  const copy = document.createElement('canvas');
  Object.assign(copy, { width: canvas.width, height: canvas.height });
  const context = copy.getContext('2d', { willReadFrequently: true });
  if (!context) throw new Error('The browser gives no 2D canvas.');
  context.drawImage(canvas, 0, 0);
  return context.getImageData(0, 0, copy.width, copy.height).data;
};

/** Draws until something is to be seen (the renderer starts in its own time), then gives the pixels. */
const drawn = async (
  stage: Stage,
  canvas: HTMLCanvasElement,
  what: StageInput,
): Promise<Uint8ClampedArray> => {
  for (let i = 0; i < 200; i += 1) {
    stage.draw(what);
    const got = pixels(canvas);
    if (got[3] === 255) return got;
    await new Promise((done) => setTimeout(done, 20));
  }
  throw new Error('The stage drew nothing.');
};

/** A picture of flat colour columns, ready to be drawn. */
const columns = async (id: string, colours: readonly (readonly number[])[], height = 8): Promise<void> => {
  const data = new ImageData(colours.length, height);
  for (let y = 0; y < height; y += 1)
    for (const [x, colour] of colours.entries()) data.data.set(colour, (y * colours.length + x) * 4);
  const bitmap = await createImageBitmap(data, { premultiplyAlpha: 'premultiply' });
  files.set(id, { kind: 'picture', bitmap, width: colours.length, height });
};

export const stagePage = {
  files,
  open,
  stageOn,
  layer,
  drawing,
  frame,
  list,
  input,
  wholeMap,
  pixels,
  drawn,
  columns,
  createFileStore,
  pictureData,
};
export type StagePage = typeof stagePage;
Object.assign(globalThis, { stagePage });
