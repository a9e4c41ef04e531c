import type { RenderTexture, TextureSource, WebGLRenderer } from 'pixi.js';
import type { DrawItem, DrawList, DrawSource, ScreenFrame } from '#shared/scene/drawingList';
import type { BlendMode, DrawingName } from '#shared/scene/schema';
import { drawingFragment } from './drawings/drawingShaders';
import type { LayerPictures } from './layerPictures';
import { coversScreen, fillsScreen, type LayerMap, layerMap, type Size } from './layerPlace';
import { createPass, intoTexture, type Output, type Pass } from './pass';
import { type ComposeSlot, composeFragment, slots } from './shaders/compose';
import { transitionFragment } from './shaders/output';
import type { Targets } from './targets';

/** Draws the picture of one screen. */
export interface ScreenPainter {
  /** Draws it into each output. The last pass goes there straight: no picture in between. */
  paint(frame: ScreenFrame, size: Size, paused: boolean, outputs: readonly Output[]): void;
  dispose(): void;
}

interface Laid {
  item: DrawItem;
  source: TextureSource;
  size: Size;
}

/** A pass that is set up, and the scratch pictures it reads. */
interface Ready {
  pass: Pass;
  reads: RenderTexture[];
}

type Drawing = Extract<DrawSource, { kind: 'drawing' }>;

/** Slats of the transition across a screen as wide as it is high. */
const slatsAcross = 7;
/** Compose programs kept: one for each order of modes that scenes use. */
const mostPrograms = 48;

/** Things made once for a key; the oldest goes when there are too many. */
const createStore = (most: number, make: (key: string) => Pass) => {
  const held = new Map<string, Pass>();
  return {
    of(key: string): Pass {
      const pass = held.get(key) ?? make(key);
      held.delete(key);
      held.set(key, pass);
      const [oldest] = held;
      if (held.size > most && oldest) {
        held.delete(oldest[0]);
        oldest[1].dispose();
      }
      return pass;
    },
    dispose() {
      for (const pass of held.values()) pass.dispose();
    },
  };
};

const createDrawings = (renderer: WebGLRenderer) => {
  const passes = createStore(Number.POSITIVE_INFINITY, (name) =>
    createPass(renderer, {
      fragment: drawingFragment(name as DrawingName),
      uniforms: { uMoment: 1, uDials: 1, uP0: 1, uP1: 1, uP2: 1, uP3: 1 },
      textures: [],
    }),
  );
  return {
    ready(source: Drawing, size: Size): Pass {
      const pass = passes.of(source.drawing);
      pass.set('uMoment', [source.beat, source.timeS, source.seed, size.width / size.height]);
      pass.set('uDials', [source.a, source.b]);
      for (let i = 0; i < 4; i += 1) pass.set(`uP${i}`, [...(source.palette[i] ?? [0, 0, 0]), 1]);
      return pass;
    },
    dispose: () => passes.dispose(),
  };
};

/** A layer of a compose program as a word of its key, and back. */
const slotWord = (mode: BlendMode, map: LayerMap | undefined): string =>
  map && coversScreen(map) ? mode : `${mode}|edged`;
const slotOf = (word: string): ComposeSlot => {
  const [mode, edged] = word.split('|');
  return { mode: mode as BlendMode, edged: edged !== undefined };
};

const createComposer = (renderer: WebGLRenderer) => {
  const passes = createStore(mostPrograms, (key) => {
    const [start, ...layers] = key.split(' ');
    return createPass(renderer, {
      fragment: composeFragment(layers.map(slotOf), start === 'base'),
      uniforms: { uGround: 1, uAcross: slots, uDown: slots, uSize: slots },
      textures: [...(start === 'base' ? ['uBase'] : []), ...layers.map((_, i) => `uLayer${i}`)],
    });
  });
  return {
    ready(list: DrawList, base: RenderTexture | null, layers: readonly Laid[], screen: Size): Pass {
      const maps = layers.map(({ item, size }) => layerMap(item, size, screen));
      const words = layers.map(({ item }, i) => slotWord(item.blend, maps[i]));
      const pass = passes.of([base ? 'base' : 'ground', ...words].join(' '));
      pass.set('uGround', list.ground);
      if (base) pass.texture('uBase', base.source);
      for (const [i, { item, source }] of layers.entries()) {
        const map = maps[i];
        if (!map) continue;
        pass.set('uAcross', [...map.across, item.opacity], i);
        pass.set('uDown', map.down, i);
        pass.set('uSize', [map.size.width, map.size.height], i);
        pass.texture(`uLayer${i}`, source);
      }
      return pass;
    },
    dispose: () => passes.dispose(),
  };
};

const isSeen = (item: DrawItem): boolean => item.opacity > 0 && item.place.scale > 0;

/** The one drawing that is all there is to see, if so. */
const aloneIn = (items: readonly DrawItem[]): Drawing | null => {
  const [only, second] = items;
  if (!only || second || only.source.kind !== 'drawing') return null;
  return only.opacity === 1 && only.blend === 'normal' && fillsScreen(only) ? only.source : null;
};

export const createScreenPainter = (
  renderer: WebGLRenderer,
  targets: Targets,
  pictures: LayerPictures,
): ScreenPainter => {
  const drawings = createDrawings(renderer);
  const composer = createComposer(renderer);
  const transition = createPass(renderer, {
    fragment: transitionFragment,
    uniforms: { uTurn: 1 },
    textures: ['uUnder', 'uOver'],
  });

  const finish = ({ pass, reads }: Ready, outputs: readonly Output[]): void => {
    for (const output of outputs) pass.draw(output);
    pass.release();
    for (const target of reads) targets.give(target);
  };

  const drawn = (ready: Ready, size: Size): RenderTexture => {
    const target = targets.take(size.width, size.height);
    finish(ready, [intoTexture(target)]);
    return target;
  };

  /** Layers four at a time; a further pass starts from what the last one drew. */
  const readyList = (list: DrawList, paused: boolean, size: Size): Ready => {
    const items = list.items.filter(isSeen);
    const alone = aloneIn(items);
    if (alone) return { pass: drawings.ready(alone, size), reads: [] };
    let base: RenderTexture | null = null;
    let layers: Laid[] = [];
    let reads: RenderTexture[] = [];
    for (const item of items) {
      if (layers.length === slots) {
        base = drawn({ pass: composer.ready(list, base, layers, size), reads }, size);
        layers = [];
        reads = [base];
      }
      if (item.source.kind === 'drawing') {
        const scratch = drawn({ pass: drawings.ready(item.source, size), reads: [] }, size);
        reads.push(scratch);
        layers.push({ item, source: scratch.source, size });
        continue;
      }
      const picture = pictures.of(item, size, paused);
      if (picture) layers.push({ item, ...picture });
    }
    return { pass: composer.ready(list, base, layers, size), reads };
  };

  return {
    paint({ under, over, transition: turn }, size, paused, outputs) {
      if (!under || !turn || turn.kind === 'cut' || turn.progress >= 1)
        return finish(readyList(over, paused, size), outputs);
      const top = drawn(readyList(over, paused, size), size);
      const bottom = drawn(readyList(under, paused, size), size);
      const slats =
        turn.kind === 'slats' ? Math.max(3, Math.round((slatsAcross * size.width) / size.height)) : 0;
      transition.set('uTurn', [turn.progress, slats, size.width / size.height]);
      transition.texture('uUnder', bottom.source);
      transition.texture('uOver', top.source);
      finish({ pass: transition, reads: [top, bottom] }, outputs);
    },
    dispose() {
      drawings.dispose();
      composer.dispose();
      transition.dispose();
    },
  };
};
