import type { RenderTexture, TextureSource, WebGLRenderer } from 'pixi.js';
import type { DrawItem, DrawList, DrawSource, ScreenFrame } from '#shared/scene/drawingList';
import type { DrawingName } from '#shared/scene/schema';
import { drawingFragment } from './drawings/drawingShaders';
import type { LayerPictures } from './layerPictures';
import { fillsScreen, layerMap, type Size } from './layerPlace';
import { createPass, type Pass, wholeTexture } from './pass';
import { composeFragment, modeNumber, slots } from './shaders/compose';
import { transitionFragment } from './shaders/output';
import type { Targets } from './targets';

/** Draws the picture of one screen. */
export interface ScreenPainter {
  /** The picture, to be given back to the targets after use. */
  paint(frame: ScreenFrame, size: Size, paused: boolean): RenderTexture;
  dispose(): void;
}

interface Laid {
  item: DrawItem;
  source: TextureSource;
  size: Size;
}

type Drawing = Extract<DrawSource, { kind: 'drawing' }>;

/** Slats of the transition across a screen as wide as it is high. */
const slatsAcross = 7;

const createDrawings = (renderer: WebGLRenderer, targets: Targets) => {
  const passes = new Map<DrawingName, Pass>();
  const passOf = (name: DrawingName): Pass => {
    const pass =
      passes.get(name) ??
      createPass(renderer, {
        fragment: drawingFragment(name),
        uniforms: { uMoment: 1, uDials: 1, uP0: 1, uP1: 1, uP2: 1, uP3: 1 },
        textures: [],
      });
    passes.set(name, pass);
    return pass;
  };
  return {
    draw(source: Drawing, size: Size): RenderTexture {
      const pass = passOf(source.drawing);
      pass.set('uMoment', [source.beat, source.timeS, source.seed, size.width / size.height]);
      pass.set('uDials', [source.a, source.b]);
      for (let i = 0; i < 4; i += 1) pass.set(`uP${i}`, [...(source.palette[i] ?? [0, 0, 0]), 1]);
      const target = targets.take(size.width, size.height);
      pass.draw(target, wholeTexture, true);
      return target;
    },
    dispose() {
      for (const pass of passes.values()) pass.dispose();
    },
  };
};

export const createScreenPainter = (
  renderer: WebGLRenderer,
  targets: Targets,
  pictures: LayerPictures,
): ScreenPainter => {
  const drawings = createDrawings(renderer, targets);
  const layerNames = Array.from({ length: slots }, (_, i) => `uLayer${i}`);
  const compose = createPass(renderer, {
    fragment: composeFragment,
    uniforms: { uGround: 1, uCount: 1, uAcross: slots, uDown: slots, uSize: slots },
    textures: ['uBase', ...layerNames],
  });
  const transition = createPass(renderer, {
    fragment: transitionFragment,
    uniforms: { uTurn: 1 },
    textures: ['uUnder', 'uOver'],
  });

  const setSlot = (i: number, { item, source, size }: Laid, screen: Size): void => {
    const map = layerMap(item, size, screen);
    compose.set('uAcross', [...map.across, item.opacity], i);
    compose.set('uDown', [...map.down, modeNumber(item.blend)], i);
    compose.set('uSize', [map.size.width, map.size.height], i);
    compose.texture(`uLayer${i}`, source);
  };

  /** Layers four at a time; a further pass starts from what the last one drew. */
  const lay = (list: DrawList, paused: boolean, size: Size): RenderTexture => {
    let base: RenderTexture | null = null;
    let waiting: Laid[] = [];
    let scratch: RenderTexture[] = [];
    const flush = (): void => {
      const target = targets.take(size.width, size.height);
      compose.set('uGround', base ? [0, 0, 0, 1] : [...list.ground, 0]);
      compose.set('uCount', [waiting.length]);
      if (base) compose.texture('uBase', base.source);
      for (const [i, laid] of waiting.entries()) setSlot(i, laid, size);
      compose.draw(target, wholeTexture, true);
      for (const target_ of scratch) targets.give(target_);
      if (base) targets.give(base);
      base = target;
      waiting = [];
      scratch = [];
    };
    for (const item of list.items) {
      if (item.opacity <= 0 || item.place.scale === 0) continue;
      if (waiting.length === slots) flush();
      if (item.source.kind === 'drawing') {
        const drawn = drawings.draw(item.source, size);
        scratch.push(drawn);
        waiting.push({ item, source: drawn.source, size });
      } else {
        const picture = pictures.of(item, size, paused);
        if (picture) waiting.push({ item, ...picture });
      }
    }
    if (waiting.length > 0 || !base) flush();
    return base as unknown as RenderTexture;
  };

  const paintList = (list: DrawList, paused: boolean, size: Size): RenderTexture => {
    const [only, second] = list.items;
    const stands =
      only &&
      !second &&
      only.source.kind === 'drawing' &&
      only.opacity === 1 &&
      only.blend === 'normal' &&
      fillsScreen(only);
    return stands ? drawings.draw(only.source as Drawing, size) : lay(list, paused, size);
  };

  return {
    paint({ under, over, transition: turn }, size, paused) {
      const top = paintList(over, paused, size);
      if (!under || !turn || turn.kind === 'cut' || turn.progress >= 1) return top;
      const bottom = paintList(under, paused, size);
      const target = targets.take(size.width, size.height);
      const slats =
        turn.kind === 'slats' ? Math.max(3, Math.round((slatsAcross * size.width) / size.height)) : 0;
      transition.set('uTurn', [turn.progress, slats, size.width / size.height]);
      transition.texture('uUnder', bottom.source);
      transition.texture('uOver', top.source);
      transition.draw(target, wholeTexture, true);
      targets.give(bottom);
      targets.give(top);
      return target;
    },
    dispose() {
      drawings.dispose();
      compose.dispose();
      transition.dispose();
    },
  };
};
