import 'pixi.js/unsafe-eval';
import 'pixi.js/mesh';
import {
  Geometry,
  Mesh,
  type RenderTexture,
  Shader,
  Texture,
  type TextureSource,
  UniformGroup,
  type WebGLRenderer,
} from 'pixi.js';
import { quadVertex } from './shaders/quad';

/** A 3×3 map, column by column, as GLSL keeps it. */
export type Columns = readonly number[];

/** Unit square onto a whole texture: v = 0 in its first row. */
export const wholeTexture: Columns = [2, 0, 0, 0, 2, 0, -1, -1, 1];
/** Unit square onto the whole canvas: v = 0 at its top. */
export const wholeCanvas: Columns = [2, 0, 0, 0, -2, 0, -1, 1, 1];

export interface Pass {
  /** A vec4, or the vec4 at `index` of an array. Missing parts are 0. */
  set(name: string, value: readonly number[], index?: number): void;
  texture(name: string, source: TextureSource): void;
  /** Draws the quad. `target` null is the canvas; `clear` first fills it with opaque black. */
  draw(target: RenderTexture | null, map: Columns, clear: boolean): void;
  dispose(): void;
}

export interface PassShape {
  fragment: string;
  /** Length of each vec4 uniform: 1 for a single one. */
  uniforms: Readonly<Record<string, number>>;
  textures: readonly string[];
}

const quad = (): Geometry =>
  new Geometry({
    attributes: { aPosition: [0, 0, 1, 0, 1, 1, 0, 1] },
    indexBuffer: [0, 1, 2, 0, 2, 3],
  });

/** One full draw of one shader: every pass of the stage is one of these. */
export const createPass = (renderer: WebGLRenderer, { fragment, uniforms, textures }: PassShape): Pass => {
  const map = new Float32Array(9);
  const values = new Map(Object.entries(uniforms).map(([name, size]) => [name, new Float32Array(4 * size)]));
  const group = new UniformGroup({
    uMap: { value: map, type: 'mat3x3<f32>' },
    ...Object.fromEntries(
      [...values].map(([name, value]) => {
        const size = value.length / 4;
        return [
          name,
          size > 1 ? { value, type: 'vec4<f32>' as const, size } : { value, type: 'vec4<f32>' as const },
        ];
      }),
    ),
  });
  const shader = Shader.from({
    gl: { vertex: quadVertex, fragment },
    resources: {
      stage: group,
      ...Object.fromEntries(textures.map((name) => [name, Texture.EMPTY.source])),
    },
  });
  const geometry = quad();
  const mesh = new Mesh({ geometry, shader });
  return {
    set(name, value, index = 0) {
      const held = values.get(name);
      for (let i = 0; i < 4; i += 1) if (held) held[index * 4 + i] = value[i] ?? 0;
    },
    texture(name, source) {
      if (shader.resources[name] !== source) shader.resources[name] = source;
    },
    draw(target, columns, clear) {
      map.set(columns);
      renderer.render({
        container: mesh,
        clear,
        clearColor: [0, 0, 0, 1],
        ...(target ? { target } : {}),
      });
      // A texture that a shader still names can't be destroyed cleanly.
      for (const name of textures) shader.resources[name] = Texture.EMPTY.source;
    },
    dispose() {
      mesh.destroy();
      geometry.destroy();
      shader.destroy();
    },
  };
};
