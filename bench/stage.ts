import { chromium, type Page } from 'playwright';
import type { StagePage } from '../e2e/stagePage/stagePage';
import { openStagePage } from '../e2e/support/stageBundle';
import { drawingFragment } from '../src/stage/drawings/drawingShaders';

/** What the page offers; functions given to `evaluate` run there. */
declare const stagePage: StagePage;

const [width, height] = [640, 360] as const;
const drawings = ['slats', 'weave', 'ripple', 'tide'] as const;
const stills = ['a', 'b', 'c', 'd'] as const;
/** Rounds take turns, so that other work on the machine falls on both alike. */
const [rounds, framesARound] = [5, 6] as const;

interface Scene {
  name: string;
  layers: readonly { kind: 'drawing' | 'still'; name: string }[];
}

const scenes: Scene[] = [1, 2, 4].flatMap((count) => [
  {
    name: `${count} drawing${count > 1 ? 's' : ''}`,
    layers: drawings.slice(0, count).map((name) => ({ kind: 'drawing' as const, name })),
  },
  {
    name: `${count} still${count > 1 ? 's' : ''}`,
    layers: stills.slice(0, count).map((name) => ({ kind: 'still' as const, name })),
  },
]);

/** Puts both renderers on the page: ours, and bare WebGL2 that draws the same layers straight onto its canvas. */
const prepare = (page: Page): Promise<void> =>
  page.evaluate(
    async ({ width, height, fragments, stills }) => {
      const paint = (hue: number): HTMLCanvasElement => {
        const canvas = document.createElement('canvas');
        Object.assign(canvas, { width, height });
        const context = canvas.getContext('2d');
        for (let i = 0; context && i < 200; i += 1) {
          context.fillStyle = `hsl(${hue + i} 60% ${10 + (i % 5) * 9}%)`;
          context.fillRect((i * 97) % width, (i * 61) % height, 90, 60);
        }
        return canvas;
      };
      const canvas = document.createElement('canvas');
      Object.assign(canvas, { width, height });
      const gl = canvas.getContext('webgl2', { antialias: false });
      if (!gl) throw new Error('This browser has no WebGL2.');
      const vertex =
        '#version 300 es\nin vec2 aAt; out vec2 vUv; out vec2 vEdge; void main() { vUv = vEdge = aAt; gl_Position = vec4(aAt.x * 2.0 - 1.0, 1.0 - aAt.y * 2.0, 0.0, 1.0); }';
      const textured =
        '#version 300 es\nprecision highp float; in vec2 vUv; out vec4 o; uniform sampler2D uPicture; void main() { o = texture(uPicture, vUv); }';
      const programOf = (fragment: string): WebGLProgram => {
        const program = gl.createProgram();
        for (const [type, text] of [
          [gl.VERTEX_SHADER, vertex],
          [gl.FRAGMENT_SHADER, fragment],
        ] as const) {
          const shader = gl.createShader(type);
          if (!shader) throw new Error('The card gives no shader.');
          gl.shaderSource(shader, text);
          gl.compileShader(shader);
          gl.attachShader(program, shader);
        }
        gl.bindAttribLocation(program, 0, 'aAt');
        gl.linkProgram(program);
        if (!gl.getProgramParameter(program, gl.LINK_STATUS))
          throw new Error('A bare program does not link.');
        return program;
      };
      gl.bindBuffer(gl.ARRAY_BUFFER, gl.createBuffer());
      gl.bufferData(gl.ARRAY_BUFFER, new Float32Array([0, 0, 1, 0, 0, 1, 1, 1]), gl.STATIC_DRAW);
      gl.enableVertexAttribArray(0);
      gl.vertexAttribPointer(0, 2, gl.FLOAT, false, 0, 0);
      const pictureProgram = programOf(textured);
      const programs = new Map(Object.entries(fragments).map(([name, text]) => [name, programOf(text)]));
      const textures = new Map<string, WebGLTexture>();
      for (const [i, name] of stills.entries()) {
        const picture = paint(i * 80);
        const bitmap = await createImageBitmap(picture, { premultiplyAlpha: 'premultiply' });
        stagePage.files.set(name, { kind: 'picture', bitmap, width, height });
        const texture = gl.createTexture();
        gl.bindTexture(gl.TEXTURE_2D, texture);
        gl.texParameteri(gl.TEXTURE_2D, gl.TEXTURE_MIN_FILTER, gl.LINEAR);
        gl.texImage2D(gl.TEXTURE_2D, 0, gl.RGBA, gl.RGBA, gl.UNSIGNED_BYTE, picture);
        textures.set(name, texture);
      }
      const ours = stagePage.open(width, height);
      await stagePage.drawn(ours.stage, ours.canvas, stagePage.input(width, height, []));
      const oursGl = ours.canvas.getContext('webgl2');
      if (!oursGl) throw new Error('The stage has no WebGL2.');
      const pixel = new Uint8Array(4);
      /** A pixel read back makes sure that the frame is drawn and not only asked for. */
      const settle = (on: WebGL2RenderingContext): void =>
        on.readPixels(0, 0, 1, 1, on.RGBA, on.UNSIGNED_BYTE, pixel);
      const bare = (layers: Scene['layers'], beat: number): void => {
        gl.viewport(0, 0, width, height);
        gl.clearColor(0, 0, 0, 1);
        gl.clear(gl.COLOR_BUFFER_BIT);
        gl.enable(gl.BLEND);
        for (const [i, layer] of layers.entries()) {
          gl.blendFunc(gl.ONE, i === 0 ? gl.ZERO : gl.ONE);
          const program = programs.get(layer.name) ?? pictureProgram;
          // biome-ignore lint/correctness/useHookAtTopLevel: a method of WebGL, no hook.
          gl.useProgram(program);
          const item = layer.kind === 'drawing' ? stagePage.drawing(layer.name as 'tide', beat).source : null;
          if (item?.kind === 'drawing') {
            const at = (name: string) => gl.getUniformLocation(program, name);
            gl.uniform4f(at('uMoment'), item.beat, item.timeS, item.seed, width / height);
            gl.uniform4f(at('uLight'), 1, 0, 0, 0);
            gl.uniform4f(at('uDials'), item.a, item.b, 0, 0);
            for (const [n, [r, g, b]] of item.palette.entries()) gl.uniform4f(at(`uP${n}`), r, g, b, 1);
          } else gl.bindTexture(gl.TEXTURE_2D, textures.get(layer.name) ?? null);
          gl.drawArrays(gl.TRIANGLE_STRIP, 0, 4);
        }
        settle(gl);
      };
      const staged = (layers: Scene['layers'], beat: number): void => {
        const items = layers.map((layer, i) => {
          const more = { blend: i === 0 ? ('normal' as const) : ('add' as const), key: `run/${i}` };
          return layer.kind === 'drawing'
            ? stagePage.drawing(layer.name as 'tide', beat, 126, more)
            : stagePage.layer({ kind: 'picture', assetId: layer.name }, more);
        });
        ours.stage.draw(stagePage.input(width, height, [stagePage.frame(stagePage.list(items))]));
        settle(oursGl);
      };
      Object.assign(globalThis, { bench: { bare, staged } });
    },
    {
      width,
      height,
      stills: [...stills],
      fragments: Object.fromEntries(drawings.map((name) => [name, drawingFragment(name)])),
    },
  );

/** Set by `prepare`. */
declare const bench: Record<'bare' | 'staged', (layers: Scene['layers'], beat: number) => void>;

interface Row {
  name: string;
  /** Median time of a frame over that of the bare page. */
  ratioToBare: number;
  /** Passes over the picture in one frame of ours. */
  passes: number;
  medianMs: number;
  bareMedianMs: number;
}

const measure = (page: Page, scene: Scene): Promise<Row> =>
  page.evaluate(
    async ({ scene, rounds, framesARound }) => {
      const median = (times: number[]): number => times.sort((a, b) => a - b)[times.length >> 1] ?? 0;
      const round2 = (value: number): number => Math.round(value * 100) / 100;
      const times: Record<'bare' | 'staged', number[]> = { bare: [], staged: [] };
      const proto = WebGL2RenderingContext.prototype;
      const { drawElements } = proto;
      let passes = 0;
      proto.drawElements = function counted(...asked) {
        passes += 1;
        drawElements.apply(this, asked);
      };
      bench.bare(scene.layers, 0);
      passes = 0;
      bench.staged(scene.layers, 0);
      const counted = passes;
      proto.drawElements = drawElements;
      for (let r = 0; r < rounds; r += 1)
        for (const kind of ['bare', 'staged'] as const)
          for (let f = 0; f < framesARound; f += 1) {
            const start = performance.now();
            bench[kind](scene.layers, r * framesARound + f);
            times[kind].push(performance.now() - start);
            await new Promise((done) => setTimeout(done, 0));
          }
      const [ours, theirs] = [median(times.staged), median(times.bare)];
      return {
        name: scene.name,
        ratioToBare: round2(ours / theirs),
        passes: counted,
        medianMs: round2(ours),
        bareMedianMs: round2(theirs),
      };
    },
    { scene, rounds, framesARound },
  );

const main = async (): Promise<void> => {
  const browser = await chromium.launch({
    executablePath: process.env.CHROMIUM || '/usr/bin/chromium',
    args: ['--no-sandbox', '--use-angle=swiftshader', '--enable-unsafe-swiftshader'],
  });
  try {
    const page = await browser.newPage({ viewport: { width: 800, height: 500 } });
    // The loader of this file names functions with a helper that the page doesn't have.
    await page.addInitScript('globalThis.__name = (f) => f');
    await openStagePage(page);
    await prepare(page);
    const rows: Row[] = [];
    for (const scene of scenes) rows.push(await measure(page, scene));
    if (process.argv.includes('--json'))
      console.log(JSON.stringify({ raster: [width, height], scenes: rows }));
    else console.table(rows);
  } finally {
    await browser.close();
  }
};

await main();
