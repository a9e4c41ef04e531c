import { execFileSync } from 'node:child_process';
import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import sharp from 'sharp';

/** Two seconds of one colour with a moving bar and sound, as a phone makes it: H.264 with AAC, odd-sized and long-GOP. */
export function makeMp4(colour = '0x1f9d55'): string {
  const path = join(mkdtempSync(join(tmpdir(), 'lampyrid-clip-')), 'green wall.mp4');
  const picture = `color=c=${colour}:s=642x362:r=25:d=2`;
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
      'sine=frequency=300:duration=2',
    ],
    ...['-c:v', 'libx264', '-pix_fmt', 'yuv420p', '-g', '250', '-c:a', 'aac', '-shortest', path],
  ]);
  return path;
}

/** A white disc on nothing: the poorest logo there is. */
export async function makePng(): Promise<string> {
  const path = join(mkdtempSync(join(tmpdir(), 'lampyrid-mark-')), 'disc.png');
  const svg =
    '<svg xmlns="http://www.w3.org/2000/svg" width="400" height="400"><circle cx="200" cy="200" r="200" fill="#ffffff"/></svg>';
  await sharp(Buffer.from(svg)).png().toFile(path);
  return path;
}
