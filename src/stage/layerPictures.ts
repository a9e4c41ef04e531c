import { ImageSource, type TextureSource } from 'pixi.js';
import type { DrawItem } from '#shared/scene/drawingList';
import { type ClipPlayer, createClipPlayer } from './clipPlayer';
import { fontReady } from './fonts';
import type { Size } from './layerPlace';
import type { FileSource } from './types';
import { type Words, wordsPicture, wordsSide } from './wordsPicture';

export interface LayerPicture {
  source: TextureSource;
  size: Size;
}

interface Held {
  picture(): LayerPicture | null;
  rest(): void;
  destroy(): void;
  /** Frame of the last use. */
  used: number;
  clip: ClipPlayer | null;
  /** What it was made from: a file that was fetched again is another. */
  from: unknown;
}

/** Pictures, words and clips of layers, kept while they are asked for. */
export interface LayerPictures {
  /** The picture of an item on a screen of this size, or null when there is none (yet). */
  of(item: DrawItem, screen: Size, paused: boolean): LayerPicture | null;
  /** Ends a frame: clips that nobody asked for pause, and what lies unused goes. */
  tidy(): void;
  dispose(): void;
}

/** Frames something may lie unused: a take of stills comes back within seconds, a run that is gone never does. */
const idleFrames = 90;

const still = (source: TextureSource, size: Size, destroy: () => void, from: unknown): Held => ({
  picture: () => ({ source, size }),
  rest: () => undefined,
  destroy,
  used: 0,
  clip: null,
  from,
});

export const createLayerPictures = (files: FileSource): LayerPictures => {
  const held = new Map<string, Held>();
  let frame = 0;

  const keep = (key: string, from: unknown, make: () => Held): Held => {
    const old = held.get(key);
    if (old && old.from === from) {
      old.used = frame;
      return old;
    }
    old?.destroy();
    const made = make();
    made.used = frame;
    held.set(key, made);
    return made;
  };

  const words = (source: Words, item: DrawItem, screen: Size): LayerPicture | null => {
    // Drawn at once in what there is, and again when their font has come.
    const ready = fontReady(source.weight, source.mono, source.text);
    const aspect = screen.width / screen.height;
    const content = [source.text, source.weight, source.colour, source.mono, aspect.toFixed(2)].join(' ');
    const side = wordsSide(Math.max(screen.width, screen.height) * Math.min(1, item.place.scale));
    return keep(`words ${content} ${side}`, ready, () => {
      const made = wordsPicture(source, aspect, side);
      return still(made.source, made.size, () => made.source.destroy(), ready);
    }).picture();
  };

  const picture = (assetId: string, screen: Size): LayerPicture | null => {
    const file = files.get(assetId);
    if (file?.kind !== 'picture') return null;
    return keep(`picture ${assetId}`, file.bitmap, () => {
      const large = Math.max(file.width / screen.width, file.height / screen.height) > 1.4;
      const source = new ImageSource({
        resource: file.bitmap,
        alphaMode: 'premultiplied-alpha',
        autoGenerateMipmaps: large,
        scaleMode: 'linear',
      });
      return still(source, file, () => source.destroy(), file.bitmap);
    }).picture();
  };

  const clip = (key: string, item: Extract<DrawItem['source'], { kind: 'clip' }>, paused: boolean) => {
    const file = files.get(item.assetId);
    if (file?.kind !== 'clip') return null;
    const entry = keep(`clip ${key}`, file.url, () => {
      const player = createClipPlayer(file.url, file.durationS, file.fps);
      return {
        picture: () => {
          const source = player.source();
          return source && { source, size: file };
        },
        rest: () => player.rest(),
        destroy: () => player.dispose(),
        used: frame,
        clip: player,
        from: file.url,
      };
    });
    entry.clip?.hold(item.positionS, item.rate, paused);
    return entry.picture();
  };

  return {
    of(item, screen, paused) {
      const { source } = item;
      if (source.kind === 'words') return words(source, item, screen);
      if (source.kind === 'picture') return picture(source.assetId, screen);
      return source.kind === 'clip' ? clip(item.key, source, paused) : null;
    },
    tidy() {
      for (const [key, entry] of held) {
        if (entry.used === frame) continue;
        entry.rest();
        if (frame - entry.used < idleFrames) continue;
        entry.destroy();
        held.delete(key);
      }
      frame += 1;
    },
    dispose() {
      for (const entry of held.values()) entry.destroy();
      held.clear();
    },
  };
};
