import { inputGuards, type VideoFacts } from './probe';

/** What every clip becomes: a file that seeks fast and loops without a gap. */
export const mezzanine = {
  /** Longest and shortest side, px. */
  most: [1920, 1080] as const,
  /** Key frame each so many frames: a seek decodes fifteen frames at the most. */
  keyEach: 15,
  maxFps: 30,
  crf: 20,
} as const;

const even = (value: number): number => Math.max(2, Math.round(value / 2) * 2);

/** Even size inside the most, in the shape it had; never larger than it was. px */
export const fitSize = ({ width, height }: Pick<VideoFacts, 'width' | 'height'>): [number, number] => {
  const [long, short] = mezzanine.most;
  const [mostW, mostH] = width >= height ? [long, short] : [short, long];
  const scale = Math.min(1, mostW / width, mostH / height);
  return [even(width * scale), even(height * scale)];
};

/** Constant frame rate: what it had, rounded to a common rate, 30 at the most. */
export const steadyFps = (fps: number): number =>
  fps > mezzanine.maxFps ? (fps % 25 < 1 ? 25 : 30) : Math.max(1, Math.round(fps * 1000) / 1000);

/** HDR to standard range: linear light, Hable's curve, BT.709. Without it phone video looks grey. */
const toneMap =
  'zscale=t=linear:npl=100,format=gbrpf32le,zscale=p=bt709,tonemap=hable:desat=0,zscale=t=bt709:m=bt709:r=tv';

/**
 * Arguments of ffmpeg for one clip: H.264 yuv420p, short closed groups, no B frames, constant rate, silent, nothing
 * of the original's metadata, the index in front. Progress comes on standard output.
 * @param threads 1 while a show is live
 */
export const transcodeArgs = (from: string, to: string, facts: VideoFacts, threads: number): string[] => {
  const [width, height] = fitSize(facts);
  const filters = [
    ...(facts.hdr ? [toneMap] : []),
    `scale=${width}:${height}:flags=lanczos`,
    'setsar=1',
    'format=yuv420p',
  ];
  return [
    ...['-v', 'error', '-nostdin', '-y', '-threads', String(threads)],
    ...inputGuards(from),
    ...['-map', '0:v:0', '-an', '-sn', '-dn', '-map_metadata', '-1', '-map_chapters', '-1'],
    ...['-vf', filters.join(','), '-r', String(steadyFps(facts.fps)), '-fps_mode', 'cfr'],
    ...['-c:v', 'libx264', '-preset', 'veryfast', '-crf', String(mezzanine.crf), '-threads', String(threads)],
    ...[
      '-g',
      String(mezzanine.keyEach),
      '-keyint_min',
      String(mezzanine.keyEach),
      '-sc_threshold',
      '0',
      '-bf',
      '0',
    ],
    ...['-flags', '+cgop', '-movflags', '+faststart', '-progress', 'pipe:1', '-f', 'mp4', to],
  ];
};

/** Seconds done, from one line of ffmpeg's progress; null for other lines. */
export const secondsDone = (line: string): number | null => {
  const match = /^out_time_us=(\d+)/.exec(line);
  return match ? Number(match[1]) / 1e6 : null;
};

/** Arguments for a poster: one frame from a tenth of the way in, 640 px at the most. */
export const posterArgs = (from: string, to: string, facts: VideoFacts): string[] => [
  ...['-v', 'error', '-nostdin', '-y', '-ss', String(facts.durationS / 10)],
  ...inputGuards(from),
  ...[
    '-frames:v',
    '1',
    '-vf',
    'scale=w=640:h=640:force_original_aspect_ratio=decrease',
    '-f',
    'image2',
    '-c:v',
    'png',
    to,
  ],
];
