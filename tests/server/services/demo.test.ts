import { execFileSync } from 'node:child_process';
import { copyFile, mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { demoTools } from '#server/media/demoMedia';
import { startMedia } from '#server/media/startMedia';
import { demoRoutes } from '#server/routes/demo';
import { nightOf } from '#server/services/demo/demoShow';
import { demoCalls } from '#server/services/demo/makeDemo';
import { demoPalette, demoPhases, demoVenue } from '#server/services/demo/night';
import { openDemo } from '#server/services/demo/openDemo';
import { demoScenes } from '#server/services/demo/scenes';
import { type DemoTools, DrawingFault } from '#server/services/demo/tools';
import type { DemoCalls } from '#server/services/demoCalls';
import { showManifest } from '#server/services/manifest';
import type { MediaCalls } from '#server/services/mediaCalls';
import { deleteShow } from '#server/services/shows/shows';
import type { DemoProgress } from '#shared/api/demo';
import { editBrandSchema, newSceneSchema, phasesSchema } from '#shared/api/shows';
import { drawingNames, sceneBodySchema } from '#shared/scene/schema';
import { venueBodySchema } from '#shared/venue/schema';
import { makeTestApp, type TestApp } from '#tests/make/app';
import { makeCrew } from '#tests/make/crew';

const ids = {
  ...{ mark: 'm', boathouse: 'b', oars: 'o', bough: 'a' },
  ...{ water: 'w', salt: 's', static: 't', pour: 'p' },
};
const scenes = demoScenes(ids);
const layers = scenes.flatMap(({ body }) => body.layers);

describe('what the demo night is made of', () => {
  it('is as the schemas want it', () => {
    for (const { name, energy, body } of scenes) {
      newSceneSchema.parse({ name, energy, body, phaseId: null });
      expect(sceneBodySchema.parse(body)).toEqual(body);
    }
    venueBodySchema.parse(demoVenue);
    phasesSchema.parse(demoPhases.map((phase, position) => ({ ...phase, id: `p${position}`, position })));
    editBrandSchema.parse({ name: 'Ottergate Cider', palette: demoPalette, markAssetId: null });
  });

  it('has twelve scenes with names of their own, and some in every phase', () => {
    expect(new Set(scenes.map(({ name }) => name)).size).toBe(12);
    expect(new Set(scenes.map(({ phase }) => phase))).toEqual(new Set(demoPhases.keys()));
  });

  it('uses every drawing, every kind of source and every file', () => {
    const sources = layers.map(({ source }) => source);
    const drawn = sources.flatMap((source) => (source.kind === 'drawing' ? source.drawing : []));
    expect(new Set(drawn)).toEqual(new Set(drawingNames));
    expect(new Set(sources.map(({ kind }) => kind)).size).toBe(5);
    const used = JSON.stringify(sources);
    for (const id of Object.values(ids)) expect(used).toContain(`"${id}"`);
  });

  it('points dials only at dials that the scene has', () => {
    for (const { body } of scenes)
      for (const { dial } of body.layers) if (dial !== null) expect(body.dials[dial]).toBeDefined();
  });

  it('has six screens, and groups of screens that are there', () => {
    const there = new Set(demoVenue.screens.map(({ id }) => id));
    expect(there.size).toBe(6);
    for (const { screenIds } of demoVenue.groups) for (const id of screenIds) expect(there).toContain(id);
  });
});

describe('the night that a moment belongs to', () => {
  it('is yesterday’s until six in the morning', () => {
    expect(nightOf(new Date(2026, 11, 6, 5, 59))).toBe('2026-12-05');
    expect(nightOf(new Date(2026, 11, 6, 6, 0))).toBe('2026-12-06');
    expect(nightOf(new Date(2027, 0, 1, 1, 0))).toBe('2026-12-31');
  });
});

describe('making the demo night', () => {
  let house: TestApp;
  let media: MediaCalls & { close: () => Promise<void> };
  let folder: string;
  /** One short clip for all, as drawing the real ones takes half a minute. */
  let shortClips: DemoTools;
  /** Small pictures too. */
  let quick: DemoTools;

  const callsWith = (tools: DemoTools): DemoCalls => {
    const { db, hub, log } = house.context;
    return demoCalls({ db, hub, log, media, tools });
  };
  const over = async (demo: DemoCalls, crewId: string): Promise<DemoProgress> => {
    await expect
      .poll(async () => (await demo.progress(crewId)).state, { timeout: 60_000, interval: 100 })
      .not.toBe('working');
    return demo.progress(crewId);
  };
  const count = async (crewId: string) => ({
    shows: await house.db.shows.count({ where: { crewId } }),
    venues: await house.db.venues.count({ where: { crewId } }),
    brands: await house.db.brands.count({ where: { crewId } }),
    assets: await house.db.assets.count({ where: { crewId } }),
  });

  beforeAll(async () => {
    house = await makeTestApp([demoRoutes]);
    const { config, log } = house.context;
    media = await startMedia({
      db: house.db,
      databaseUrl: config.databaseUrl,
      dataFolder: house.dataFolder,
      log,
      onChange: () => undefined,
      liveNow: async () => false,
    });
    folder = await mkdtemp(join(tmpdir(), 'lampyrid-demo-'));
    const clip = join(folder, 'clip.mp4');
    execFileSync('ffmpeg', ['-v', 'error', '-f', 'lavfi', '-i', 'testsrc=s=160x90:r=25:d=1', clip]);
    shortClips = { ...demoTools, clip: (_name, path) => copyFile(clip, path) };
    const dot = '<svg xmlns="http://www.w3.org/2000/svg" width="64" height="36"><circle r="20"/></svg>';
    quick = { ...shortClips, picture: (_svg, path) => demoTools.picture(dot, path) };
  });
  afterAll(async () => {
    await media.close();
    await house.close();
    await rm(folder, { recursive: true, force: true });
  });

  it('makes one night, whose scenes have all their files, however often it is asked', async () => {
    const { crewId, userId } = await makeCrew(house.db);
    const demo = callsWith(shortClips);
    expect(await demo.progress(crewId)).toMatchObject({ state: 'none', showId: null });
    expect(demo.make(crewId, userId)).toMatchObject({ state: 'working' });
    expect(demo.make(crewId, userId)).toMatchObject({ state: 'working' });
    const { state, showId, words } = await over(demo, crewId);
    expect(`${state} ${words}`).toBe('ready The night is ready.');
    const once = await count(crewId);
    expect(once).toEqual({ shows: 1, venues: 1, brands: 1, assets: 8 });
    const found = await showManifest(house.db, showId ?? '');
    expect(found?.manifest.scenes).toHaveLength(12);
    expect(found?.manifest.assets).toHaveLength(8);
    expect(found?.manifest.scenes.every(({ phaseId }) => phaseId !== null)).toBe(true);
    const clips = found?.manifest.scenes.flatMap(({ body }) =>
      body.layers.flatMap(({ source }) => (source.kind === 'clip' ? [source.assetId] : [])),
    );
    expect(clips).not.toContain(null);
    const again = callsWith(quick);
    again.make(crewId, userId);
    expect(await over(again, crewId)).toMatchObject({ state: 'ready', showId });
    expect(await count(crewId)).toEqual(once);
  });

  it('can be opened with its drawings before there is a clip, says why a clip failed, and takes up where it was', async () => {
    const { crewId, userId } = await makeCrew(house.db);
    const broken: DemoTools = {
      ...quick,
      clip: () =>
        Promise.reject(new DrawingFault('Its clips could not be drawn: ffmpeg could not be started.')),
    };
    const first = callsWith(broken);
    first.make(crewId, userId);
    const { state, words, showId } = await over(first, crewId);
    expect(state).toBe('failed');
    expect(words).toBe(
      'The demo night is not whole. Its clips could not be drawn: ffmpeg could not be started.',
    );
    expect((await showManifest(house.db, showId ?? ''))?.manifest.scenes).toHaveLength(12);
    // As after a restart: nothing is known but what the database holds.
    const second = callsWith(quick);
    expect(await second.progress(crewId)).toMatchObject({ state: 'failed', showId });
    second.make(crewId, userId);
    expect(await over(second, crewId)).toMatchObject({ state: 'ready', showId });
    expect(await count(crewId)).toEqual({ shows: 1, venues: 1, brands: 1, assets: 8 });
    await deleteShow(house.db, crewId, showId ?? '');
    expect(await second.progress(crewId)).toMatchObject({ state: 'none', showId: null });
  });

  it('keeps what a person changed while clips were drawn', async () => {
    const { crewId, userId } = await makeCrew(house.db);
    let changed = false;
    const slow: DemoTools = {
      ...quick,
      clip: async (name, path) => {
        if (!changed) {
          changed = true;
          await house.db.scenes.update({ energy: 7 }, { where: { name: 'Water light', deletedAt: null } });
        }
        await quick.clip(name, path);
      },
    };
    const demo = callsWith(slow);
    demo.make(crewId, userId);
    const { showId } = await over(demo, crewId);
    const scene = await house.db.scenes.findOne({ where: { showId: showId ?? '', name: 'Water light' } });
    expect(scene).toMatchObject({ energy: 7, version: 2 });
  });

  it('makes crew and lead by itself, once, and prints how to sign in', async () => {
    const open = await makeTestApp([]);
    const asked: unknown[] = [];
    const demo: DemoCalls = {
      make: (...who) => {
        asked.push(who);
        return { state: 'working', progress: 0, words: '', showId: null };
      },
      progress: () => Promise.reject(new Error('Not asked for.')),
    };
    const lines = await openDemo(open.db, demo, null);
    expect(lines.join(' ')).toMatch(/lead@boathouse\.example with the password: (\w+ ){4}\w+/);
    expect(await openDemo(open.db, demo, null)).not.toEqual(lines);
    expect(await open.db.users.count()).toBe(1);
    expect(asked).toHaveLength(2);
    expect(asked[1]).toEqual(asked[0]);
    await open.close();
  });
});

describe('the demo night’s clips', () => {
  it('are refused in a sentence when they cannot be drawn', async () => {
    const folder = await mkdtemp(join(tmpdir(), 'lampyrid-demo-'));
    await writeFile(join(folder, 'file'), '');
    const nowhere = join(folder, 'file', 'clip.mp4');
    const drawing = demoTools.clip('cider pour', nowhere);
    await expect(drawing).rejects.toThrow(DrawingFault);
    await expect(drawing).rejects.toThrow(/^The clip “cider pour” could not be drawn: .+\.$/);
    await rm(folder, { recursive: true });
  }, 60_000);
});
