import sharp from 'sharp';
import { type DemoClip, type DemoTools, DrawingFault } from '#server/services/demo/tools';
import { demoClipShape, demoClips } from './demoClips';
import { type RunResult, run } from './run';

/** A clip takes about six seconds on two busy cores. */
const limitMs = 120_000;

/** Nearly lossless, as the clip is converted once more. */
const argsOf = (name: DemoClip, to: string): string[] => [
  ...['-v', 'error', '-nostdin', '-y', '-filter_complex', `${demoClips[name]}[out]`, '-map', '[out]'],
  ...['-t', String(demoClipShape.seconds), '-an', '-c:v', 'libx264', '-preset', 'ultrafast', '-crf', '10'],
  ...['-pix_fmt', 'yuv420p', '-f', 'mp4', to],
];

const runFfmpeg = async (name: DemoClip, to: string): Promise<RunResult> => {
  try {
    return await run('ffmpeg', argsOf(name, to), { limitMs });
  } catch {
    throw new DrawingFault('Its clips could not be drawn: ffmpeg could not be started.');
  }
};

/** Draws the demo night's files with ffmpeg and sharp. */
export const demoTools: DemoTools = {
  clip: async (name, path) => {
    const { code, ended, stderr } = await runFfmpeg(name, path);
    if (code === 0) return;
    const said = stderr.trim().split('\n').at(-1)?.slice(-200);
    const why = ended === 'time' ? 'it took longer than two minutes' : said || 'ffmpeg is missing';
    throw new DrawingFault(`The clip “${name}” could not be drawn: ${why}.`);
  },
  picture: async (svg, path) => {
    await sharp(Buffer.from(svg)).png().toFile(path);
  },
};
