import type { WebGLRenderer } from 'pixi.js';

/** How many stages a canvas has had: the graphics context of a canvas can't be made twice. */
const owners = new WeakMap<HTMLCanvasElement, number>();
/** Ms that a context outlives its stage, so that a page that mounts twice finds it whole. */
const grace = 1000;

export interface HeldContext {
  lost(): boolean;
  /** Keeps the renderer's end from losing the context. */
  keepThrough(renderer: WebGLRenderer): void;
  /** Gives the card back, unless another stage has taken the canvas. */
  release(): void;
}

export const holdContext = (canvas: HTMLCanvasElement): HeldContext => {
  const turn = (owners.get(canvas) ?? 0) + 1;
  owners.set(canvas, turn);
  return {
    lost: () => canvas.getContext('webgl2')?.isContextLost() ?? false,
    keepThrough(renderer) {
      const { extensions } = renderer.context;
      delete extensions.loseContext;
    },
    release() {
      setTimeout(() => {
        if (owners.get(canvas) !== turn) return;
        canvas.getContext('webgl2')?.getExtension('WEBGL_lose_context')?.loseContext();
      }, grace);
    },
  };
};
