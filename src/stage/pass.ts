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

/** Where a pass draws. */
export interface Output {
  /** null is the canvas. */
  target: RenderTexture | null;
  /** Unit square to clip space. */
  map: Columns;
  /** Part of the picture that is seen: x, y, w, h as shares. */
  part: readonly [number, number, number, number];
  /** Factor on code values, 0..1. */
  light: number;
  /** First fills the target with opaque black. */
  clear: boolean;
}

const whole = [0, 0, 1, 1] as const;

/** The whole of a texture: v = 0 in its first row. */
export const intoTexture = (target: RenderTexture): Output => ({
  target,
  map: [2, 0, 0, 0, 2, 0, -1, -1, 1],
  part: whole,
  light: 1,
  clear: true,
});

/** The whole canvas: v = 0 at its top. */
export const overCanvas: Output = {
  target: null,
  map: [2, 0, 0, 0, -2, 0, -1, 1, 1],
  part: whole,
  light: 1,
  clear: false,
};

export interface Pass {
  /** A vec4, or the vec4 at `index` of an array. Missing parts are 0. */
  set(name: string, value: readonly number[], index?: number): void;
  texture(name: string, source: TextureSource): void;
  draw(output: Output): void;
  /** Lets go of the textures: one that a shader still names can't be destroyed cleanly. */
  release(): void;
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
  const values = new Map(
    Object.entries({ ...uniforms, uPart: 1, uLight: 1 }).map(([name, size]) => [
      name,
      new Float32Array(4 * size),
    ]),
  );
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
  const set: Pass['set'] = (name, value, index = 0) => {
    const held = values.get(name);
    for (let i = 0; i < 4; i += 1) if (held) held[index * 4 + i] = value[i] ?? 0;
  };
  const texture: Pass['texture'] = (name, source) => {
    if (shader.resources[name] !== source) shader.resources[name] = source;
  };
  return {
    set,
    texture,
    draw({ target, map: columns, part, light, clear }) {
      map.set(columns);
      set('uPart', part);
      set('uLight', [light]);
      renderer.render({
        container: mesh,
        clear,
        clearColor: [0, 0, 0, 1],
        ...(target ? { target } : {}),
      });
    },
    release() {
      for (const name of textures) texture(name, Texture.EMPTY.source);
    },
    dispose() {
      mesh.destroy();
      geometry.destroy();
      shader.destroy();
    },
  };
};
