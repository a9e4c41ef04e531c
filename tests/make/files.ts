import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import sharp from 'sharp';

const folder = mkdtempSync(join(tmpdir(), 'lampyrid-files-'));

/** A video as a phone makes it: odd-sized, long GOP, with sound, and lying on its side if asked. */
export function phoneVideo(options: { seconds?: number; turned?: boolean } = {}): Buffer {
  const { seconds = 2, turned = false } = options;
  const flat = join(folder, 'flat.mkv');
  const out = join(folder, 'phone.mp4');
  const picture = `testsrc=s=321x181:r=30:d=${seconds}`;
  execFileSync('ffmpeg', [
    ...[
      '-v',
      'error',
      '-y',
      '-f',
      'lavfi',
      '-i',
      picture,
      '-f',
      'lavfi',
      '-i',
      `sine=frequency=300:duration=${seconds}`,
    ],
    ...['-c:v', 'libx264', '-pix_fmt', 'yuv444p', '-g', '250', '-bf', '3', '-c:a', 'aac', flat],
  ]);
  const turn = turned ? ['-metadata:s:v', 'rotate=90'] : [];
  execFileSync('ffmpeg', ['-v', 'error', '-y', '-i', flat, '-c', 'copy', ...turn, out]);
  return readFileSync(out);
}

/** A test picture of ffmpeg's in a container of choice, told by the ending of the name. Silent, 25 pictures a second. */
export function plainVideo(name: string, seconds: number, ...more: string[]): Buffer {
  const out = join(folder, name);
  const picture = `testsrc2=s=320x180:r=25:d=${seconds}`;
  execFileSync('ffmpeg', ['-v', 'error', '-y', '-f', 'lavfi', '-i', picture, ...more, out]);
  return readFileSync(out);
}

/** A red disc on nothing. */
export const discPng = (): Promise<Buffer> => sharp(Buffer.from(discSvg())).png().toBuffer();

/** The same as a vector drawing. */
export const discSvg = (): string =>
  '<svg xmlns="http://www.w3.org/2000/svg" width="64" height="64"><circle cx="32" cy="32" r="30" fill="#ff0000"/></svg>';

/** A plain JPEG that a camera has turned by its EXIF orientation. */
export const turnedJpeg = (): Promise<Buffer> =>
  sharp({ create: { width: 80, height: 40, channels: 3, background: '#225588' } })
    .jpeg()
    .withMetadata({ orientation: 6 })
    .toBuffer();

/** What ffprobe says of the video stream of a file, and whether there is sound. */
export function probeFile(path: string) {
  const json = execFileSync('ffprobe', [
    ...[
      '-v',
      'error',
      '-print_format',
      'json',
      '-show_streams',
      '-show_entries',
      'frame=key_frame,pict_type',
    ],
    ...['-select_streams', 'v', '-show_frames', path],
  ]);
  const parsed = JSON.parse(json.toString()) as {
    streams: { width: number; height: number; pix_fmt: string; codec_name: string; r_frame_rate: string }[];
    frames: { key_frame: number; pict_type: string }[];
  };
  const all = execFileSync('ffprobe', [
    '-v',
    'error',
    '-show_entries',
    'stream=codec_type',
    '-of',
    'csv=p=0',
    path,
  ]);
  return { ...parsed, kinds: all.toString().trim().split('\n') };
}

/** Writes bytes to a file of its own and gives its path. */
export function writeTemp(name: string, bytes: Buffer | string): string {
  const path = join(mkdtempSync(join(folder, 'f-')), name);
  writeFileSync(path, bytes);
  return path;
}
