import type { ImageSource } from 'pixi.js';
import { sourceOf } from './wordsPicture';

/** Canvases made once for a key and thrown away when nobody asked for them in a frame. */
export interface Kept {
  of(key: string, make: () => HTMLCanvasElement): ImageSource;
  tidy(): void;
  dispose(): void;
}

export const createKept = (): Kept => {
  const held = new Map<string, { source: ImageSource; used: boolean }>();
  const drop = (all: boolean): void => {
    for (const [key, entry] of held) {
      if (entry.used && !all) {
        entry.used = false;
        continue;
      }
      entry.source.destroy();
      held.delete(key);
    }
  };
  return {
    of(key, make) {
      const entry = held.get(key) ?? { source: sourceOf(make()), used: true };
      entry.used = true;
      held.set(key, entry);
      return entry.source;
    },
    tidy: () => drop(false),
    dispose: () => drop(true),
  };
};
