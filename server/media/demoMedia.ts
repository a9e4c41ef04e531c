import sharp from 'sharp';
import type { DemoClip, DemoTools } from '#server/services/demo/tools';
import { run } from './run';

/** Length of a demo clip, s: all motion in it turns once or twice in this time, so that it loops without a seam. */
const lengthS = 8;
const turn = `2*PI*T/${lengthS}`;
/** Light is computed small and grey, then enlarged and coloured: a formula for each pixel is slow in ffmpeg. */
const small = `color=c=black:s=320x180:r=25:d=${lengthS},format=gray`;
const enlarge = 'scale=960:540:flags=bicubic,format=gbrp';

/** A number 0..1 for each cell of a grid, the same each time. */
const cell = (size: number): string =>
  `mod(abs(43758.5453*sin(12.9898*floor(X/${size})+78.233*floor(Y/${size}))),1)`;

/** Filter graphs of the clips, our own. Nothing in them changes faster than twice in eight seconds. */
const graphs: Record<DemoClip, string> = {
  // Light through moving water on the floor of a boathouse.
  'water light': `${small},geq=lum='255*pow(abs(0.5*sin(X/21+1.7*sin(Y/29+${turn}))+0.5*cos(Y/17+1.9*sin(X/33-${turn})+sin(X/13-Y/19+2*${turn}))),0.5)',negate,lutyuv=y='255*pow(val/255,2.6)',${enlarge},curves=r='0/0 0.5/0.08 1/0.85':g='0/0.02 0.5/0.42 1/1':b='0/0.06 0.5/0.46 1/0.92'`,
  // Grains of salt that catch a lamp as it goes by.
  'salt glints': `${small},geq=lum='255*exp(-((mod(X,12)-6+4*(${cell(12)}-0.5))^2+(mod(Y,12)-6)^2)/(1+5*${cell(12)}))*pow(0.5+0.5*cos(${turn}+2*PI*${cell(12)}+X/60),2)',${enlarge},gblur=sigma=1.4,curves=r='0/0.01 0.5/0.62 1/1':g='0/0.02 0.5/0.66 1/1':b='0/0.05 0.5/0.78 1/1'`,
  // Something amber that is poured slowly.
  'cider pour': `${small},geq=lum='255*pow(0.5+0.5*sin(Y/40+2.2*sin(X/70+${turn})+1.1*sin(X/31-Y/47+2*${turn})),1.6)',${enlarge},gblur=sigma=5,curves=r='0/0.06 0.5/0.62 1/1':g='0/0.02 0.5/0.26 1/0.8':b='0/0.01 0.5/0.05 1/0.42'`,
};

const limitMs = 120_000;

/** Draws the demo night's files with ffmpeg and sharp. */
export const demoTools: DemoTools = {
  clip: async (name, path) => {
    const args = ['-v', 'error', '-nostdin', '-y', '-f', 'lavfi', '-i', graphs[name]];
    const out = [
      '-c:v',
      'libx264',
      '-preset',
      'ultrafast',
      '-crf',
      '14',
      '-pix_fmt',
      'yuv420p',
      '-f',
      'mp4',
      path,
    ];
    const { code, stderr } = await run('ffmpeg', [...args, ...out], { limitMs });
    if (code !== 0) throw new Error(`The clip “${name}” could not be made: ${stderr.slice(-300)}`);
  },
  picture: async (svg, path) => {
    await sharp(Buffer.from(svg)).png().toFile(path);
  },
};
