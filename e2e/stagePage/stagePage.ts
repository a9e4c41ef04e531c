import { wholeMap } from '#shared/mapping/rectangle';
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

const input = (
  width: number,
  height: number,
  frames: ScreenFrame[],
  more: Partial<StageInput> = {},
): StageInput => ({
  frames,
  map: wholeMap('wall', [width, height]),
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

const lit = Array.from({ length: 256 }, (_, i) => i / 255).map((value) =>
  value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4,
);

/** Relative luminance of each point of a drawn picture, 0..1 (WCAG 2.2, definition of “relative luminance”). */
const luminances = (data: Uint8ClampedArray): number[] => {
  const part = (at: number): number => lit[data[at] ?? 0] ?? 0;
  return Array.from(
    { length: data.length / 4 },
    (_, p) => 0.2126 * part(p * 4) + 0.7152 * part(p * 4 + 1) + 0.0722 * part(p * 4 + 2),
  );
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
  pixels,
  luminances,
  drawn,
  columns,
  createFileStore,
  pictureData,
};
export type StagePage = typeof stagePage;
Object.assign(globalThis, { stagePage });
