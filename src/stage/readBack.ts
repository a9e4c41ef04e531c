import type { WebGLRenderer } from 'pixi.js';
import { homographyTo, isConvex } from '#shared/mapping/homography';
import { cornersOn } from './regionShape';
import type { StageInput, StagePicture } from './types';

/** Reads small true pictures of what the canvas shows: its own pixels, un-warped. */
export interface Reader {
  /** Must be asked in the task that drew. */
  read(input: StageInput, maxSide: number): Promise<StagePicture[]>;
  dispose(): void;
}

const vertex = `#version 300 es
in vec2 aAt;
uniform vec4 uPart;
out vec2 vIn;
void main() {
  vIn = aAt;
  gl_Position = vec4((uPart.xy + aAt * uPart.zw) * 2.0 - 1.0, 0.0, 1.0);
}
`;

/** A box of 5×5 samples stands for the pixels that fall together in one. */
const fragment = `#version 300 es
precision highp float;
in vec2 vIn;
out vec4 outColour;
uniform mat3 uMap; // region to canvas pixels, y down
uniform vec2 uCanvas;
uniform sampler2D uDrawn;
void main() {
  vec2 dx = dFdx(vIn), dy = dFdy(vIn);
  vec3 middle = uMap * vec3(vIn, 1.0);
  vec2 drawn = middle.xy / middle.z;
  // No wider than what falls together: pixel on pixel, it is one sample.
  float many = max(length(dFdx(drawn)), length(dFdy(drawn)));
  float spread = clamp(1.0 - 1.0 / max(many, 1e-3), 0.0, 1.0);
  vec3 sum = vec3(0.0);
  for (int i = 0; i < 25; i++) {
    vec2 off = (vec2(i % 5, i / 5) - 2.0) / 5.0 * spread;
    vec3 q = uMap * vec3(vIn + dx * off.x + dy * off.y, 1.0);
    vec2 at = q.xy / q.z / uCanvas;
    sum += texture(uDrawn, vec2(at.x, 1.0 - at.y)).rgb;
  }
  outColour = vec4(sum / 25.0, 1.0);
}
`;

interface Gear {
  program: WebGLProgram;
  vao: WebGLVertexArrayObject;
  corners: WebGLBuffer;
  drawn: WebGLTexture;
  small: WebGLTexture;
  frame: WebGLFramebuffer;
  part: WebGLUniformLocation | null;
  map: WebGLUniformLocation | null;
  canvas: WebGLUniformLocation | null;
}

const compiled = (gl: WebGL2RenderingContext): WebGLProgram => {
  const program = gl.createProgram();
  for (const [type, source] of [
    [gl.VERTEX_SHADER, vertex],
    [gl.FRAGMENT_SHADER, fragment],
  ] as const) {
    const shader = gl.createShader(type);
    if (!shader) throw new Error('The graphics card is lost.');
    gl.shaderSource(shader, source);
    gl.compileShader(shader);
    gl.attachShader(program, shader);
    gl.deleteShader(shader);
  }
  gl.bindAttribLocation(program, 0, 'aAt');
  gl.linkProgram(program);
  return program;
};

const texture = (gl: WebGL2RenderingContext): WebGLTexture => {
  const made = gl.createTexture();
  gl.bindTexture(gl.TEXTURE_2D, made);
  gl.texParameteri(gl.TEXTURE_2D, gl.TEXTURE_MIN_FILTER, gl.LINEAR);
  gl.texParameteri(gl.TEXTURE_2D, gl.TEXTURE_MAG_FILTER, gl.LINEAR);
  gl.texParameteri(gl.TEXTURE_2D, gl.TEXTURE_WRAP_S, gl.CLAMP_TO_EDGE);
  gl.texParameteri(gl.TEXTURE_2D, gl.TEXTURE_WRAP_T, gl.CLAMP_TO_EDGE);
  return made;
};

const gearFor = (gl: WebGL2RenderingContext): Gear => {
  const program = compiled(gl);
  const vao = gl.createVertexArray();
  gl.bindVertexArray(vao);
  const corners = gl.createBuffer();
  gl.bindBuffer(gl.ARRAY_BUFFER, corners);
  gl.bufferData(gl.ARRAY_BUFFER, new Float32Array([0, 0, 1, 0, 0, 1, 1, 1]), gl.STATIC_DRAW);
  gl.enableVertexAttribArray(0);
  gl.vertexAttribPointer(0, 2, gl.FLOAT, false, 0, 0);
  gl.bindVertexArray(null);
  return {
    program,
    vao,
    corners,
    drawn: texture(gl),
    small: texture(gl),
    frame: gl.createFramebuffer(),
    part: gl.getUniformLocation(program, 'uPart'),
    map: gl.getUniformLocation(program, 'uMap'),
    canvas: gl.getUniformLocation(program, 'uCanvas'),
  };
};

/** Waits without blocking until the card has done what was asked before the fence. */
const fenced = (gl: WebGL2RenderingContext): Promise<boolean> =>
  new Promise((resolve) => {
    const fence = gl.fenceSync(gl.SYNC_GPU_COMMANDS_COMPLETE, 0);
    gl.flush();
    const look = (): void => {
      if (!fence || gl.isContextLost()) {
        resolve(false);
        return;
      }
      const status = gl.clientWaitSync(fence, 0, 0);
      if (status === gl.TIMEOUT_EXPIRED) {
        setTimeout(look, 8);
        return;
      }
      gl.deleteSync(fence);
      resolve(status !== gl.WAIT_FAILED);
    };
    setTimeout(look, 4);
  });

/** Draws all regions of one screen into the small picture, each at its part of the screen. */
const drawScreen = (gl: WebGL2RenderingContext, gear: Gear, input: StageInput, screenId: string): void => {
  const canvas = { width: gl.drawingBufferWidth, height: gl.drawingBufferHeight };
  for (const region of input.map.regions) {
    const corners = cornersOn(region, input.map.raster, canvas);
    if (region.screenId !== screenId || !isConvex(corners)) continue;
    const [a, b, c, d, e, f, g, h, i] = homographyTo(corners);
    const { x, y, w, h: high } = region.source;
    gl.uniform4f(gear.part, x, y, w, high);
    gl.uniformMatrix3fv(gear.map, false, [a, d, g, b, e, h, c, f, i]);
    gl.uniform2f(gear.canvas, canvas.width, canvas.height);
    gl.drawArrays(gl.TRIANGLE_STRIP, 0, 4);
  }
};

const sizeWithin = (maxSide: number, metres: { width: number; height: number }): [number, number] => {
  const scale = maxSide / Math.max(metres.width, metres.height);
  return [Math.max(1, Math.round(metres.width * scale)), Math.max(1, Math.round(metres.height * scale))];
};

interface Pending {
  screenId: string;
  width: number;
  height: number;
  buffer: WebGLBuffer;
}

const copyCanvas = (gl: WebGL2RenderingContext, gear: Gear): void => {
  gl.bindFramebuffer(gl.FRAMEBUFFER, null);
  gl.activeTexture(gl.TEXTURE0);
  gl.bindSampler(0, null);
  gl.bindTexture(gl.TEXTURE_2D, gear.drawn);
  gl.copyTexImage2D(gl.TEXTURE_2D, 0, gl.RGB, 0, 0, gl.drawingBufferWidth, gl.drawingBufferHeight, 0);
};

const start = (gl: WebGL2RenderingContext, gear: Gear, input: StageInput, maxSide: number): Pending[] => {
  copyCanvas(gl, gear);
  // biome-ignore lint/correctness/useHookAtTopLevel: a method of WebGL, no hook.
  gl.useProgram(gear.program);
  gl.bindVertexArray(gear.vao);
  for (const part of [gl.BLEND, gl.SCISSOR_TEST, gl.CULL_FACE, gl.DEPTH_TEST, gl.STENCIL_TEST])
    gl.disable(part);
  gl.colorMask(true, true, true, true);
  const screens = [...new Set(input.map.regions.map((region) => region.screenId))];
  const pending: Pending[] = [];
  for (const screenId of screens) {
    const metres = input.screenSizes[screenId];
    if (!metres) continue;
    const [width, height] = sizeWithin(maxSide, metres);
    gl.bindTexture(gl.TEXTURE_2D, gear.small);
    gl.texImage2D(gl.TEXTURE_2D, 0, gl.RGBA8, width, height, 0, gl.RGBA, gl.UNSIGNED_BYTE, null);
    gl.bindFramebuffer(gl.FRAMEBUFFER, gear.frame);
    gl.framebufferTexture2D(gl.FRAMEBUFFER, gl.COLOR_ATTACHMENT0, gl.TEXTURE_2D, gear.small, 0);
    gl.viewport(0, 0, width, height);
    gl.clearColor(0, 0, 0, 1);
    gl.clear(gl.COLOR_BUFFER_BIT);
    gl.bindTexture(gl.TEXTURE_2D, gear.drawn);
    drawScreen(gl, gear, input, screenId);
    const buffer = gl.createBuffer();
    gl.bindBuffer(gl.PIXEL_PACK_BUFFER, buffer);
    gl.bufferData(gl.PIXEL_PACK_BUFFER, width * height * 4, gl.STREAM_READ);
    gl.readPixels(0, 0, width, height, gl.RGBA, gl.UNSIGNED_BYTE, 0);
    pending.push({ screenId, width, height, buffer });
  }
  gl.bindBuffer(gl.PIXEL_PACK_BUFFER, null);
  gl.bindVertexArray(null);
  return pending;
};

const finish = (gl: WebGL2RenderingContext, pending: readonly Pending[], whole: boolean): StagePicture[] => {
  const pictures = pending.map(({ screenId, width, height, buffer }) => {
    const pixels = new Uint8Array(width * height * 4);
    gl.bindBuffer(gl.PIXEL_PACK_BUFFER, buffer);
    if (whole) gl.getBufferSubData(gl.PIXEL_PACK_BUFFER, 0, pixels);
    gl.deleteBuffer(buffer);
    return { screenId, width, height, pixels };
  });
  gl.bindBuffer(gl.PIXEL_PACK_BUFFER, null);
  return whole ? pictures : [];
};

export const createReader = (renderer: WebGLRenderer): Reader => {
  const { gl } = renderer;
  let gear: Gear | null = null;
  const forget = (): void => {
    gear = null;
  };
  const { canvas } = renderer.view;
  canvas.addEventListener?.('webglcontextlost', forget);
  return {
    async read(input, maxSide) {
      if (gl.isContextLost()) return [];
      gear ??= gearFor(gl);
      const pending = start(gl, gear, input, maxSide);
      // The renderer remembers what it bound; it has to forget.
      renderer.resetState();
      return finish(gl, pending, await fenced(gl));
    },
    dispose() {
      canvas.removeEventListener?.('webglcontextlost', forget);
      if (!gear) return;
      gl.deleteProgram(gear.program);
      gl.deleteVertexArray(gear.vao);
      gl.deleteBuffer(gear.corners);
      gl.deleteTexture(gear.drawn);
      gl.deleteTexture(gear.small);
      gl.deleteFramebuffer(gear.frame);
    },
  };
};
