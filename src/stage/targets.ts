import { RenderTexture } from 'pixi.js';

/** Scratch pictures by size: taken and given back within a frame, freed when a size is no longer asked for. */
export interface Targets {
  take(width: number, height: number): RenderTexture;
  give(target: RenderTexture): void;
  /** Ends a frame: frees what has lain unused for a while. */
  tidy(): void;
  dispose(): void;
}

/** Frames that a scratch picture may lie unused. */
const idleFrames = 30;

export const createTargets = (): Targets => {
  const free: { target: RenderTexture; since: number }[] = [];
  const taken = new Set<RenderTexture>();
  let frame = 0;
  return {
    take(width, height) {
      const at = free.findIndex(({ target }) => target.width === width && target.height === height);
      const found = at >= 0 ? free.splice(at, 1)[0]?.target : undefined;
      const target = found ?? RenderTexture.create({ width, height, antialias: false, resolution: 1 });
      taken.add(target);
      return target;
    },
    give(target) {
      if (taken.delete(target)) free.push({ target, since: frame });
    },
    tidy() {
      frame += 1;
      for (let i = free.length - 1; i >= 0; i -= 1) {
        const entry = free[i];
        if (!entry || frame - entry.since < idleFrames) continue;
        entry.target.destroy(true);
        free.splice(i, 1);
      }
    },
    dispose() {
      for (const { target } of free) target.destroy(true);
      for (const target of taken) target.destroy(true);
      free.length = 0;
      taken.clear();
    },
  };
};
