import { once } from 'node:events';
import { copyFileSync, existsSync, readdirSync, watch } from 'node:fs';
import { type IncomingMessage, request } from 'node:http';
import { type AddressInfo, connect } from 'node:net';
import { join } from 'node:path';
import sharp from 'sharp';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startMedia } from '#server/media/startMedia';
import { accountRoutes } from '#server/routes/accounts';
import { assetRoutes } from '#server/routes/assets';
import type { RouteContext } from '#server/routes/context';
import { mediaRoutes } from '#server/routes/media';
import { setUpLink } from '#server/services/accounts/setUp';
import { makeLog } from '#server/services/log';
import type { MediaCalls } from '#server/services/mediaCalls';
import { tokenHash } from '#server/services/tokens';
import type { Asset } from '#shared/api/assets';
import { newBody, newLayer } from '#shared/scene/defaults';
import { type Browser, makeTestApp, type TestApp } from '#tests/make/app';
import { makeCrew, makeShow } from '#tests/make/crew';
import {
  discPng,
  discSvg,
  phoneVideo,
  plainVideo,
  probeFile,
  turnedJpeg,
  writeTemp,
} from '#tests/make/files';

type Media = MediaCalls & { close: () => Promise<void> };

let house: TestApp;
let media: Media;
let lead: Browser;
let crewId: string;
/** The lead's cookies, for requests that are made by hand. */
let cookies: string;
const changed: string[] = [];

/** Media jobs of a house; the routes get them through `late`, as they are made after the app. */
const start = (): Promise<Media> =>
  startMedia({
    db: house.db,
    databaseUrl: house.context.config.databaseUrl,
    dataFolder: house.dataFolder,
    log: makeLog('silent'),
    onChange: (id) => void changed.push(id),
    liveNow: async () => false,
  });

beforeAll(async () => {
  const late: MediaCalls = {
    ingest: (file) => media.ingest(file),
    settled: (id) => media.settled(id),
    get mediaFolder() {
      return media.mediaFolder;
    },
    get incomingFolder() {
      return media.incomingFolder;
    },
  };
  const parts: Partial<RouteContext> = { media: late };
  house = await makeTestApp([accountRoutes, assetRoutes, mediaRoutes], parts);
  media = await start();
  lead = house.browser();
  const token = await setUpLink(house.db);
  const ines = { crewName: 'Boathouse crew', name: 'Ines Varga', email: 'ines@crew.example' };
  const made = await lead.post('/api/setup', {
    token,
    ...ines,
    password: 'salt static and otters',
    demo: false,
  });
  crewId = made.body.crew.id;
  const given: unknown = made.headers['set-cookie'];
  cookies = (Array.isArray(given) ? given.map(String) : []).map((one) => one.split(';')[0]).join('; ');
});
afterAll(async () => {
  await media.close();
  await house.close();
});

const send = (name: string, bytes: Buffer | string, browser = lead) =>
  browser
    .post('/api/assets')
    .set('x-file-name', encodeURIComponent(name))
    .set('content-type', 'application/octet-stream')
    .send(bytes);

async function upload(name: string, bytes: Buffer | string): Promise<Asset> {
  const { body } = await send(name, bytes).expect(201);
  expect(body).toMatchObject({ addedBy: 'Ines Varga' });
  await media.settled(body.id);
  return (await lead.get(`/api/assets/${body.id}`).expect(200)).body;
}

const fileOf = (asset: Asset) => join(media.mediaFolder, (asset.url ?? '').replace('/media/', ''));

describe('a video', () => {
  it('becomes even-sized, silent, with a key frame each fifteen frames and none that looks ahead', async () => {
    const asset = await upload('tide at dusk.mov', phoneVideo());
    expect(asset).toMatchObject({ name: 'tide at dusk', kind: 'clip', state: 'ready', progress: 1, fps: 30 });
    expect([asset.width, asset.height]).toEqual([322, 182]);
    const { streams, frames, kinds } = probeFile(fileOf(asset));
    expect(kinds).toEqual(['video']);
    expect(streams[0]).toMatchObject({ codec_name: 'h264', pix_fmt: 'yuv420p' });
    const keys = frames.flatMap((frame, at) => (frame.key_frame === 1 ? [at] : []));
    expect(keys).toEqual(frames.flatMap((_frame, at) => (at % 15 === 0 ? [at] : [])));
    expect(frames.some((frame) => frame.pict_type === 'B')).toBe(false);
    expect(
      (await sharp(join(media.mediaFolder, (asset.posterUrl ?? '').replace('/media/', ''))).metadata())
        .format,
    ).toBe('webp');
    expect(changed).toContain(crewId);
  });

  it('that was filmed upright stays upright', async () => {
    const asset = await upload('upright.mp4', phoneVideo({ seconds: 1, turned: true }));
    expect((asset.height ?? 0) > (asset.width ?? 0)).toBe(true);
  });

  it('that ends in the middle fails with a sentence', async () => {
    const whole = phoneVideo({ seconds: 1 });
    const asset = await upload('cut.mp4', whole.subarray(0, Math.floor(whole.length * 0.3)));
    expect(asset.state).toBe('failed');
    expect(asset.fault).toMatch(/upload it again/);
  });

  // Such a file opens and plays: only its end is missing, which ffmpeg does not count as a fault.
  it.each([
    ['cut.mp4', ['-movflags', '+faststart']],
    ['cut.mkv', []],
  ])('%s whose index is in front is not taken for a shorter one', async (name, more) => {
    const whole = plainVideo(name, 4, ...more);
    const asset = await upload(name, whole.subarray(0, Math.floor(whole.length * 0.5)));
    expect([asset.state, asset.fault]).toEqual(['failed', 'This file ends in the middle: upload it again.']);
  });

  it('with pixels that are not square keeps its shape', async () => {
    const asset = await upload('wide.mp4', plainVideo('wide.mp4', 1, '-vf', 'setsar=2'));
    expect([asset.width, asset.height]).toEqual([640, 180]);
  });

  it('may be a GIF that moves', async () => {
    const asset = await upload('waves.gif', plainVideo('waves.gif', 1));
    expect(asset).toMatchObject({ kind: 'clip', state: 'ready', fps: 25, durationS: 1 });
  });

  it('without a picture fails with a sentence', async () => {
    const sound = plainVideo('sound.mp4', 1, '-f', 'lavfi', '-i', 'sine=d=1', '-map', '1:a', '-c:a', 'aac');
    const asset = await upload('sound.mp4', sound);
    expect([asset.state, asset.fault]).toEqual(['failed', 'There is no picture in this file.']);
  });

  it('that is removed while it waits for its turn leaves nothing on disk', async () => {
    const first = await send('first.mp4', plainVideo('first.mp4', 3)).expect(201);
    const second = await send('second.mp4', plainVideo('second.mp4', 1)).expect(201);
    const settled = media.settled(second.body.id);
    await lead.delete(`/api/assets/${second.body.id}`).expect(204);
    await expect(settled).rejects.toThrow('The file was removed.');
    expect((await media.settled(first.body.id)).state).toBe('ready');
    await expect.poll(() => readdirSync(join(house.dataFolder, 'originals'))).toEqual([]);
  });

  it('that is removed while it is converted leaves nothing on disk', async () => {
    const before = readdirSync(media.mediaFolder).sort();
    const { body } = await send('gone.mp4', plainVideo('gone.mp4', 3)).expect(201);
    const settled = media.settled(body.id);
    await lead.delete(`/api/assets/${body.id}`).expect(204);
    await expect(settled).rejects.toThrow('The file was removed.');
    expect(readdirSync(media.mediaFolder).sort()).toEqual(before);
    await expect.poll(() => readdirSync(join(house.dataFolder, 'originals'))).toEqual([]);
  });
});

describe('a picture', () => {
  it('with see-through parts is a mark and keeps them', async () => {
    const asset = await upload('disc.png', await discPng());
    expect(asset).toMatchObject({ kind: 'mark', state: 'ready', width: 64, height: 64 });
    const { data, info } = await sharp(fileOf(asset)).raw().toBuffer({ resolveWithObject: true });
    expect(info.channels).toBe(4);
    expect(data[3]).toBe(0);
    expect([...data.subarray((32 * 64 + 32) * 4, (32 * 64 + 32) * 4 + 4)]).toEqual([255, 0, 0, 255]);
  });

  it('as a vector drawing is drawn large', async () => {
    const asset = await upload('disc.svg', discSvg());
    expect(asset).toMatchObject({ kind: 'mark', state: 'ready' });
    expect(asset.width).toBeGreaterThan(1900);
  });

  it('that the camera has turned is put upright', async () => {
    const asset = await upload('IMG_1.JPG', await turnedJpeg());
    expect(asset).toMatchObject({ kind: 'still', width: 40, height: 80 });
  });
});

describe('what is no picture and no video', () => {
  it.each([
    ['notes.txt', 'set times and phone numbers', 'it is text'],
    ['night.m3u8', '#EXTM3U\n#EXT-X-STREAM-INF\nhttp://evil.example/a.ts', 'playlist'],
    ['tune.zip', Buffer.from('504b03041400000000000000000000000000', 'hex'), 'ZIP'],
    [
      'bomb.svg',
      '<!DOCTYPE svg [<!ENTITY a "b">]><svg xmlns="http://www.w3.org/2000/svg">&a;</svg>',
      'entities',
    ],
  ])('%s is refused in words, and nothing of it stays', async (name, bytes, words) => {
    const answer = await send(name, bytes);
    expect(answer.status).toBe(415);
    expect(answer.body.detail).toContain(words);
    expect(answer.body.mend).toContain('MP4');
    expect(readdirSync(media.incomingFolder)).toEqual([]);
  });

  it('and an empty file are refused', async () => {
    const answer = await send('empty.mp4', Buffer.alloc(0));
    expect([answer.status, answer.body.detail]).toEqual([415, 'This file is empty: upload it again.']);
  });

  it('and an upload that is broken off leaves nothing', async () => {
    const server = house.app.listen(0, '127.0.0.1');
    await once(server, 'listening');
    const { port } = server.address() as AddressInfo;
    const head = ['POST /api/assets HTTP/1.1', 'host: 127.0.0.1:4646', `cookie: ${cookies}`];
    const more = ['origin: http://127.0.0.1:4646', 'x-file-name: a.mp4', 'content-length: 900000', '', ''];
    const socket = connect(port, '127.0.0.1');
    const seen = new Promise<void>((resolve) => {
      const watcher = watch(media.incomingFolder, () => {
        watcher.close();
        resolve();
      });
    });
    socket.write([...head, ...more].join('\r\n'));
    socket.write(Buffer.alloc(100_000));
    await seen;
    socket.destroy();
    await expect.poll(() => readdirSync(media.incomingFolder)).toEqual([]);
    server.close();
  });

  it('and one larger than 2 GB is refused before it is sent', async () => {
    const server = house.app.listen(0, '127.0.0.1');
    await once(server, 'listening');
    const { port } = server.address() as AddressInfo;
    const headers = { host: '127.0.0.1:4646', origin: 'http://127.0.0.1:4646', cookie: cookies };
    const size = { 'x-file-name': 'a.mp4', 'content-length': String(3 * 1024 ** 3) };
    const sent = request({ port, method: 'POST', path: '/api/assets', headers: { ...headers, ...size } });
    sent.on('error', () => undefined).flushHeaders();
    const [answer] = (await once(sent, 'response')) as [IncomingMessage];
    expect(answer.statusCode).toBe(413);
    sent.destroy();
    server.close();
  });

  it('and an upload without a name is refused', async () => {
    await lead.post('/api/assets').set('content-type', 'application/json').send({}).expect(400);
  });
});

describe('a served file', () => {
  it('is given in parts, by its hash, for good', async () => {
    const asset = await upload('disc2.png', await discPng());
    const whole = await lead.get(asset.url ?? '').expect(200);
    expect(whole.headers).toMatchObject({
      'content-type': 'image/webp',
      'cache-control': 'private, max-age=31536000, immutable',
      'accept-ranges': 'bytes',
      etag: `"${(asset.url ?? '').replace('/media/', '').slice(0, 64)}"`,
      'x-content-type-options': 'nosniff',
    });
    const part = await lead
      .get(asset.url ?? '')
      .set('range', 'bytes=0-3')
      .expect(206);
    expect(part.headers['content-range']).toMatch(/^bytes 0-3\//);
    await lead
      .get(asset.url ?? '')
      .set('if-none-match', whole.headers.etag ?? '')
      .expect(304);
  });

  it('is its own crew’s only, and a name that leads elsewhere is nothing', async () => {
    const asset = await upload('disc3.png', await discPng());
    await house
      .browser()
      .get(asset.url ?? '')
      .expect(401);
    const other = await makeCrew(house.db);
    const show = await makeShow(house.db, other.crewId, []);
    const own = await makeShow(house.db, crewId, []);
    for (const [showId, letter, status] of [
      [show, 'd', 404],
      [own, 'e', 200],
    ] as const) {
      const device = letter.repeat(43);
      const row = { id: `display-${letter}`, showId, name: 'Wall', tokenHash: tokenHash(device) };
      await house.db.displays.create(row);
      const asked = house.browser().get(asset.url ?? '');
      await asked.set('cookie', `lampyrid.display=${device}`).expect(status);
    }
    for (const name of ['..%2f..%2fsession-secret', '%2e%2e', 'a.mp4', `${'a'.repeat(64)}.svg`])
      await lead.get(`/media/${name}`).expect(404);
  });

  it('is one file for the same content twice, and goes with its last owner', async () => {
    const bytes = await sharp({ create: { width: 9, height: 9, channels: 3, background: '#010203' } })
      .png()
      .toBuffer();
    const [a, b] = [await upload('a.png', bytes), await upload('b.png', bytes)];
    expect(a.url).toBe(b.url);
    await lead.delete(`/api/assets/${a.id}`).expect(204);
    expect(existsSync(fileOf(b))).toBe(true);
    await lead.delete(`/api/assets/${b.id}`).expect(204);
    expect(existsSync(fileOf(b))).toBe(false);
  });
});

describe('a file in the Library', () => {
  it('that a scene shows is not removed, and the refusal names the scene', async () => {
    const asset = await upload('used.png', await discPng());
    const showId = await makeShow(house.db, crewId, []);
    await house.db.scenes.create({ id: 'using', showId, name: 'Logo', energy: 5, position: 0, version: 1 });
    const source = { kind: 'mark' as const, assetId: asset.id, take: 'still' as const, amount: 0, seed: 1 };
    const body = { ...newBody(), layers: [{ ...newLayer('mark', 'l1'), source }] };
    await house.db.sceneVersions.create({ sceneId: 'using', version: 1, body });
    const answer = await lead.delete(`/api/assets/${asset.id}`);
    expect([answer.status, answer.body.detail]).toEqual([409, 'The scene “Logo” shows this file.']);
  });

  it('is renamed, and a picture never becomes a clip', async () => {
    const asset = await upload('x.png', await discPng());
    expect(
      (await lead.patch(`/api/assets/${asset.id}`, { name: 'Disc', kind: 'still' }).expect(200)).body,
    ).toMatchObject({
      name: 'Disc',
      kind: 'still',
    });
    await lead.patch(`/api/assets/${asset.id}`, { kind: 'clip' }).expect(422);
  });
});

describe('the Library', () => {
  it('is read by assistants, who add and remove nothing', async () => {
    const asset = await upload('y.png', await discPng());
    await house.db.memberships.update({ role: 'assistant' }, { where: { crewId } });
    try {
      await lead.get('/api/assets').expect(200);
      expect((await send('z.png', await discPng())).status).toBe(403);
      await lead.delete(`/api/assets/${asset.id}`).expect(403);
    } finally {
      await house.db.memberships.update({ role: 'lead' }, { where: { crewId } });
    }
  });

  it('has nothing of another crew', async () => {
    const other = await makeCrew(house.db);
    const row = { crewId: other.crewId, name: 'theirs', kind: 'still' as const, state: 'ready' as const };
    await house.db.assets.create({ ...row, id: 'theirs' });
    const { body } = await lead.get('/api/assets').expect(200);
    expect((body as Asset[]).some(({ id }) => id === 'theirs')).toBe(false);
    await lead.get('/api/assets/theirs').expect(404);
    await lead.patch('/api/assets/theirs', { name: 'mine' }).expect(404);
    await lead.delete('/api/assets/theirs').expect(404);
  });
});

describe('after a crash', () => {
  it('work that was not done is taken up, and work without its upload says so', async () => {
    await media.close();
    const original = writeTemp('clip.mp4', phoneVideo({ seconds: 1 }));
    const row = { crewId, name: 'left', kind: 'clip' as const, state: 'working' as const };
    await house.db.assets.create({ ...row, id: 'left-1' });
    await house.db.assets.create({ ...row, id: 'lost-1' });
    for (const name of ['left-1', 'nobodys'])
      copyFileSync(original, join(house.dataFolder, 'originals', name));
    media = await start();
    expect((await media.settled('left-1')).state).toBe('ready');
    await expect.poll(() => readdirSync(join(house.dataFolder, 'originals'))).toEqual([]);
    const lost = await media.settled('lost-1');
    expect([lost.state, lost.fault]).toEqual(['failed', 'The upload was lost in a crash: upload it again.']);
  });
});
