import { execFileSync } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { type House, startHouse } from '../e2e/support/house';
import type { Asset } from '../shared/api/assets';

/*
 * From the first byte of an upload to a clip that can be fired, beside ffmpeg alone with plain arguments for the same
 * kind of file. Both in one run, taking turns, so that other work on the machine falls on both alike.
 */
const rounds = 3;
const seconds = 6;
/** The library's answer is asked for this often, ms; its share of a round is small. */
const lookMs = 50;

/** A clip as cameras make it: 720p, long groups, with sound. */
function cameraClip(folder: string): string {
  const path = join(folder, 'camera.mp4');
  execFileSync('ffmpeg', [
    ...['-v', 'error', '-y', '-f', 'lavfi', '-i', `testsrc2=s=1280x720:r=30:d=${seconds}`],
    ...['-f', 'lavfi', '-i', `sine=frequency=220:duration=${seconds}`],
    ...['-c:v', 'libx264', '-preset', 'ultrafast', '-crf', '23', '-pix_fmt', 'yuv420p', '-g', '250'],
    ...['-c:a', 'aac', path],
  ]);
  return path;
}

/** ffmpeg alone: the same codec, quality and speed, and nothing else. */
function alone(from: string, folder: string): number {
  const started = performance.now();
  execFileSync('nice', [
    ...['-n', '19', 'ffmpeg', '-v', 'error', '-nostdin', '-y', '-i', from, '-an'],
    ...[
      '-c:v',
      'libx264',
      '-preset',
      'veryfast',
      '-crf',
      '20',
      '-g',
      '15',
      '-bf',
      '0',
      '-pix_fmt',
      'yuv420p',
    ],
    join(folder, 'alone.mp4'),
  ]);
  return performance.now() - started;
}

async function signIn({ address, setUpUrl }: House): Promise<string> {
  const account = { crewName: 'Bench', name: 'Bench', email: 'bench@crew.example' };
  const token = new URL(setUpUrl).hash.slice(1);
  const answer = await fetch(`${address}/api/setup`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', origin: address },
    body: JSON.stringify({ token, ...account, password: 'four otters on a raft', demo: false }),
  });
  if (!answer.ok) throw new Error(await answer.text());
  return answer.headers
    .getSetCookie()
    .map((cookie) => cookie.split(';')[0])
    .join('; ');
}

/** Uploads and waits until the file is ready. */
async function throughHouse(
  { address }: House,
  cookie: string,
  bytes: Uint8Array<ArrayBuffer>,
): Promise<{ ms: number; uploadMs: number }> {
  const started = performance.now();
  const headers = { cookie, origin: address };
  const sent = await fetch(`${address}/api/assets`, {
    method: 'POST',
    headers: { ...headers, 'x-file-name': 'camera.mp4', 'content-type': 'application/octet-stream' },
    body: bytes,
  });
  if (!sent.ok) throw new Error(await sent.text());
  const uploadMs = performance.now() - started;
  let asset = (await sent.json()) as Asset;
  while (asset.state !== 'ready') {
    if (asset.state === 'failed') throw new Error(asset.fault ?? 'failed');
    await new Promise((done) => setTimeout(done, lookMs));
    asset = (await (await fetch(`${address}/api/assets/${asset.id}`, { headers })).json()) as Asset;
  }
  return { ms: performance.now() - started, uploadMs };
}

const median = (list: readonly number[]): number =>
  [...list].sort((a, b) => a - b)[Math.floor(list.length / 2)] ?? Number.NaN;
const round = (value: number): number => Math.round(value * 100) / 100;

async function main(): Promise<void> {
  process.env.LAMPYRID_TEST_ADMIN ??= process.env.DATABASE_URL ?? '';
  const folder = mkdtempSync(join(tmpdir(), 'lampyrid-bench-'));
  const house = await startHouse();
  try {
    const cookie = await signIn(house);
    const path = cameraClip(folder);
    const clip = readFileSync(path);
    const ours: number[] = [];
    const uploads: number[] = [];
    const bare: number[] = [];
    for (let one = 0; one < rounds; one += 1) {
      bare.push(alone(path, folder));
      // A few bytes behind the last box, so that no round is the same upload as another.
      const { ms, uploadMs } = await throughHouse(house, cookie, Buffer.concat([clip, freeBox()]));
      ours.push(ms);
      uploads.push(uploadMs);
      process.stderr.write(`${Math.round(ms)} ms beside ${Math.round(bare.at(-1) ?? 0)} ms\n`);
    }
    const ratios = ours.map((ms, at) => ms / (bare[at] ?? Number.NaN));
    const report = {
      ...{ bench: 'media', rounds, clipSeconds: seconds, megabytes: round(clip.length / 1e6) },
      ...{ ratio: round(median(ratios)), ratios: ratios.map(round) },
      ...{ readyMs: Math.round(median(ours)), uploadMs: Math.round(median(uploads)) },
      ffmpegAloneMs: Math.round(median(bare)),
    };
    process.stdout.write(`${JSON.stringify(report)}\n`);
  } finally {
    await house.stop();
    rmSync(folder, { recursive: true, force: true });
  }
}

/** An MP4 box that readers skip (ISO/IEC 14496-12, 8.1.2). */
function freeBox(): Buffer {
  const box = Buffer.concat([Buffer.alloc(4), Buffer.from('free'), randomBytes(8)]);
  box.writeUInt32BE(box.length, 0);
  return box;
}

await main();
process.exit(0);
