import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { connect, type Database } from '#server/models/database';
import {
  displayByToken,
  forgetDisplay,
  listDisplays,
  listMaps,
  readDisplay,
  saveMap,
} from '#server/services/displays/displays';
import { askPairing, joinDisplay, lookUpPairing, waitPairing } from '#server/services/displays/pairing';
import { newCode, pairingWords } from '#server/services/displays/secrets';
import { tokenInCookie } from '#server/services/displays/tokenInCookie';
import type { Caller } from '#server/services/who';
import { pairingCodeSchema } from '#shared/api/displays';
import type { OutputMap } from '#shared/mapping/schema';
import { makeCrew, makeShow } from '#tests/make/crew';
import { type FreshDatabase, freshDatabase } from '#tests/make/database';
import { makeScreen } from '#tests/make/night';

let fresh: FreshDatabase;
let db: Database;
let caller: Caller;
let showId: string;
const here = { raster: [1280, 720] as [number, number], address: '127.0.0.1', browser: 'test' };
const later = (ms: number) => Date.now() + ms;

beforeAll(async () => {
  fresh = await freshDatabase();
  db = connect(fresh.url);
  caller = await makeCrew(db);
  showId = await makeShow(db, caller.crewId, [makeScreen('back', 0)]);
});
afterAll(async () => {
  await db.close();
  await fresh.drop();
});

const mapWith = (screenId: string): OutputMap => ({
  raster: [1280, 720],
  regions: [
    {
      id: 'r1',
      screenId,
      name: 'Back',
      source: { x: 0, y: 0, w: 1, h: 1 },
      corners: [
        [10, 10],
        [600, 20],
        [580, 400],
        [15, 380],
      ],
      brightness: 1,
    },
  ],
});

const join = async (name = 'Left') => {
  const asked = await askPairing(db, here);
  const id = await joinDisplay(db, caller, { code: asked.code, showId, name });
  const waited = await waitPairing(db, asked.deviceSecret, later(3000));
  if (waited.state !== 'joined') throw new Error(`The display is ${waited.state}.`);
  return { ...asked, id, token: waited.token };
};

describe('joining codes', () => {
  it('are a word of four letters and four digits, as the schema reads them', () => {
    for (let round = 0; round < 200; round += 1)
      expect(pairingCodeSchema.parse(newCode())).toMatch(/^[A-Z]{4} \d{4}$/);
    expect(new Set(pairingWords).size).toBe(pairingWords.length);
  });

  it('are taken as a person types them', () => {
    expect(pairingCodeSchema.parse(' moth-2741 ')).toBe('MOTH 2741');
  });
});

describe('joining a display', () => {
  it('goes from pending to joined, and the token is the display', async () => {
    const asked = await askPairing(db, here);
    expect((await waitPairing(db, asked.deviceSecret)).state).toBe('pending');
    expect((await lookUpPairing(db, asked.code)).raster).toEqual([1280, 720]);
    const id = await joinDisplay(db, caller, { code: asked.code, showId, name: 'Left' });
    const waited = await waitPairing(db, asked.deviceSecret, later(3000));
    expect(waited).toMatchObject({ state: 'joined', displayId: id });
    const token = waited.state === 'joined' ? waited.token : '';
    expect(await displayByToken(db, token)).toEqual({ displayId: id, showId, crewId: caller.crewId });
    const row = await db.displays.findByPk(id);
    expect(row?.tokenHash).not.toContain(token);
  });

  it('tells a display that asks too often to slow down', async () => {
    const asked = await askPairing(db, here);
    const now = Date.now();
    await waitPairing(db, asked.deviceSecret, now);
    expect((await waitPairing(db, asked.deviceSecret, now + 300)).state).toBe('slow-down');
    expect((await waitPairing(db, asked.deviceSecret, now + 2400)).state).toBe('pending');
  });

  it('ends a code after ten minutes', async () => {
    const asked = await askPairing(db, here);
    expect((await waitPairing(db, asked.deviceSecret, later(10 * 60_000 + 1))).state).toBe('expired');
    await expect(lookUpPairing(db, asked.code, later(10 * 60_000 + 1))).rejects.toThrow(/No display waits/);
  });

  it('takes a code once', async () => {
    const joined = await join();
    await expect(joinDisplay(db, caller, { code: joined.code, showId, name: 'Again' })).rejects.toThrow(
      /No display/,
    );
  });

  it('refuses a show of another crew', async () => {
    const other = await makeCrew(db);
    const asked = await askPairing(db, here);
    await expect(joinDisplay(db, other, { code: asked.code, showId, name: 'X' })).rejects.toThrow(
      /no such show/,
    );
  });

  it('holds at most 24 waiting displays at one address, and forgets those that have gone', async () => {
    const crowd = { ...here, address: '10.0.0.9' };
    for (let one = 0; one < 24; one += 1) await askPairing(db, crowd);
    await expect(askPairing(db, crowd)).rejects.toThrow(/Too many displays/);
    await expect(askPairing(db, crowd, later(31_000))).resolves.toHaveProperty('code');
  });
});

describe('a joined display', () => {
  it('has maps in versions, newest first, each kept', async () => {
    const { id } = await join();
    await saveMap(db, caller, id, { map: mapWith('back'), note: 'Lined up' });
    const versions = await listMaps(db, caller.crewId, id);
    expect(versions.map(({ version, note }) => [version, note])).toEqual([
      [2, 'Lined up'],
      [1, 'Joined'],
    ]);
    expect((await readDisplay(db, caller.crewId, id)).map).toEqual(mapWith('back'));
  });

  it('gives each of two savers a version of their own', async () => {
    const { id } = await join();
    const saved = await Promise.all(
      ['a', 'b'].map((note) => saveMap(db, caller, id, { map: mapWith('back'), note })),
    );
    expect(saved.map((one) => one.saved.version).sort()).toEqual([2, 3]);
  });

  it('refuses a region of a screen that the venue does not have', async () => {
    const { id } = await join();
    await expect(saveMap(db, caller, id, { map: mapWith('moon'), note: '' })).rejects.toMatchObject({
      status: 422,
      fields: [{ path: 'map.regions.0.screenId' }],
    });
  });

  it('is out once it is forgotten, and not of any other crew', async () => {
    const { id, token } = await join('Gone soon');
    const other = await makeCrew(db);
    await expect(readDisplay(db, other.crewId, id)).rejects.toThrow(/no such display/);
    await forgetDisplay(db, caller.crewId, id);
    expect(await displayByToken(db, token)).toBeNull();
    const names = (await listDisplays(db, caller.crewId, showId)).map((display) => display.name);
    expect(names).not.toContain('Gone soon');
  });

  it('is known by its cookie among others', () => {
    const token = 'a'.repeat(43);
    expect(tokenInCookie(`x=1; lampyrid.display=${token}; y=2`)).toBe(token);
    expect(tokenInCookie('lampyrid.display=../../etc')).toBeNull();
    expect(tokenInCookie(undefined)).toBeNull();
  });
});
