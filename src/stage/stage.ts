import { WebGLRenderer } from 'pixi.js';
import type { Corners, Region } from '#shared/mapping/schema';
import { holdContext } from './context';
import { fontReady } from './fonts';
import { createKept, type Kept } from './kept';
import { createLayerPictures, type LayerPictures } from './layerPictures';
import type { Size } from './layerPlace';
import { drawLabel, drawLineUp } from './lineUp';
import { createPass, type Output, overCanvas, type Pass } from './pass';
import { createReader, type Reader } from './readBack';
import { columnsTo, cornersOn, pictureSize } from './regionShape';
import { createScreenPainter, type ScreenPainter } from './screenPainter';
import { overFragment, pictureFragment } from './shaders/output';
import { createTargets, type Targets } from './targets';
import type { FileSource, Stage, StageInput, StagePicture } from './types';

interface Parts {
  renderer: WebGLRenderer;
  targets: Targets;
  pictures: LayerPictures;
  painter: ScreenPainter;
  kept: Kept;
  picture: Pass;
  over: Pass;
  reader: Reader;
}

interface Placed {
  region: Region;
  corners: Corners;
}

/** Ms after which a reader of pictures no longer waits for the next frame: the last one is drawn again. */
const redrawAfter = 120;

const build = async (canvas: HTMLCanvasElement, files: FileSource, size: Size): Promise<Parts> => {
  const renderer = new WebGLRenderer();
  await renderer.init({
    canvas,
    ...size,
    resolution: 1,
    antialias: false,
    backgroundAlpha: 1,
    backgroundColor: '#000000',
    clearBeforeRender: true,
    preferWebGLVersion: 2,
    powerPreference: 'high-performance',
    manageImports: false,
    hello: false,
  });
  const targets = createTargets();
  const pictures = createLayerPictures(files);
  return {
    renderer,
    targets,
    pictures,
    painter: createScreenPainter(renderer, targets, pictures),
    kept: createKept(),
    picture: createPass(renderer, { fragment: pictureFragment, uniforms: {}, textures: ['uPicture'] }),
    over: createPass(renderer, { fragment: overFragment, uniforms: {}, textures: ['uPicture'] }),
    reader: createReader(renderer),
  };
};

/** Where a region's picture goes; null when its corners make no picture. */
const outputOf = (
  { region, corners }: Placed,
  canvas: Size,
  part: Region['source'],
  light: number,
): Output | null => {
  const map = columnsTo(corners, canvas);
  const { x, y, w, h } = part;
  return map && { target: null, map, part: [x, y, w, h], light: light * region.brightness, clear: false };
};

const whole: Region['source'] = { x: 0, y: 0, w: 1, h: 1 };

/** The grid in the shape the region has on its screen, so that its circle is round on the wall. */
const drawGrid = (parts: Parts, placed: Placed, canvas: Size, screen: Size | undefined): void => {
  const { region, corners } = placed;
  const output = outputOf(placed, canvas, whole, 1);
  if (!output) return;
  const { w, h } = region.source;
  const shape = screen ? (screen.width * w) / (screen.height * h) : 16 / 9;
  const size = pictureSize([{ corners, source: whole }], shape);
  const ready = fontReady(700, false, region.name);
  const key = `line-up ${region.id} ${region.name} ${size.width} ${size.height} ${ready}`;
  parts.picture.texture(
    'uPicture',
    parts.kept.of(key, () => drawLineUp(region.name, size.width, size.height)),
  );
  parts.picture.draw(output);
  parts.picture.release();
};

const drawScreens = (parts: Parts, input: StageInput, placed: readonly Placed[], canvas: Size): void => {
  for (const frame of input.frames) {
    const own = placed.filter(({ region }) => region.screenId === frame.screenId);
    const metres = input.screenSizes[frame.screenId];
    if (own.length === 0 || !metres || frame.level <= 0) continue;
    const shapes = own.map(({ region, corners }) => ({ corners, source: region.source }));
    const outputs = own.flatMap((place) => outputOf(place, canvas, place.region.source, frame.level) ?? []);
    const size = pictureSize(shapes, metres.width / metres.height);
    parts.painter.paint(frame, size, input.paused, outputs);
  }
};

const drawAll = (parts: Parts, input: StageInput): void => {
  const { canvas } = parts.renderer.view;
  const size = { width: canvas.width, height: canvas.height };
  const placed = input.map.regions.map((region) => ({
    region,
    corners: cornersOn(region, input.map.raster, size),
  }));
  parts.renderer.renderTarget.bind({
    target: parts.renderer.view.texture,
    clear: true,
    clearColor: [0, 0, 0, 1],
  });
  if (input.lineUp)
    for (const place of placed) drawGrid(parts, place, size, input.screenSizes[place.region.screenId]);
  else drawScreens(parts, input, placed, size);
  if (input.label !== null) {
    const { label } = input;
    parts.over.texture(
      'uPicture',
      parts.kept.of(`label ${label} ${size.width} ${size.height} ${fontReady(700, false, label)}`, () =>
        drawLabel(label, size.width, size.height),
      ),
    );
    parts.over.draw(overCanvas);
    parts.over.release();
  }
  parts.pictures.tidy();
  parts.kept.tidy();
  parts.targets.tidy();
};

/**
 * A stage on a canvas. It draws nothing until the renderer is ready, and nothing while the graphics card is lost; both
 * pass by themselves.
 */
export const createStage = (canvas: HTMLCanvasElement, files: FileSource): Stage => {
  let parts: Parts | null = null;
  let size: Size = { width: Math.max(1, canvas.width), height: Math.max(1, canvas.height) };
  let last: StageInput | null = null;
  let fresh = false;
  let over = false;
  const waiting: { maxSide: number; resolve: (pictures: StagePicture[]) => void }[] = [];
  let redraw: ReturnType<typeof setTimeout> | undefined;
  const context = holdContext(canvas);

  const serve = (): void => {
    if (!parts || !last) return;
    clearTimeout(redraw);
    redraw = undefined;
    for (const { maxSide, resolve } of waiting.splice(0))
      void parts.reader.read(last, maxSide).then(resolve, () => resolve([]));
  };

  const drawNow = (input: StageInput): void => {
    if (!parts || over || context.lost()) return;
    drawAll(parts, input);
    fresh = true;
    // Pixels of the canvas can be read until the task ends.
    queueMicrotask(() => {
      fresh = false;
    });
    serve();
  };

  void build(canvas, files, size).then(
    (built) => {
      if (over) return tearDown(built);
      parts = built;
      built.renderer.resize(size.width, size.height);
      if (last) drawNow(last);
    },
    (error: unknown) => console.error('The renderer could not start.', error),
  );

  const tearDown = (built: Parts): void => {
    for (const part of [built.reader, built.painter, built.picture, built.over]) part.dispose();
    for (const part of [built.pictures, built.kept, built.targets]) part.dispose();
    context.keepThrough(built.renderer);
    built.renderer.destroy();
    context.release();
  };

  return {
    resize(width, height) {
      size = { width: Math.max(1, Math.round(width)), height: Math.max(1, Math.round(height)) };
      if (parts) parts.renderer.resize(size.width, size.height);
      else Object.assign(canvas, size);
    },
    draw(input) {
      last = input;
      drawNow(input);
    },
    readPictures(maxSide) {
      return new Promise((resolve) => {
        if (over) return resolve([]);
        waiting.push({ maxSide, resolve });
        if (fresh) return serve();
        redraw ??= setTimeout(() => {
          redraw = undefined;
          if (last) drawNow(last);
          for (const { resolve: none } of waiting.splice(0)) none([]);
        }, redrawAfter);
      });
    },
    dispose() {
      if (over) return;
      over = true;
      clearTimeout(redraw);
      for (const { resolve } of waiting.splice(0)) resolve([]);
      if (parts) tearDown(parts);
      parts = null;
      last = null;
    },
  };
};
