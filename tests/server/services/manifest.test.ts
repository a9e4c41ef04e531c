import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { connect, type Database } from '#server/models/database';
import { assetUses } from '#server/services/assetUses';
import { openShowIds, showManifest } from '#server/services/manifest';
import { makeScene, saveScene, setRemoved } from '#server/services/shows/scenes';
import type { Caller } from '#server/services/who';
import { manifestSchema } from '#shared/protocol/messages';
import { newLayer } from '#shared/scene/defaults';
import type { Source } from '#shared/scene/schema';
import { makeCrew, makeShow } from '#tests/make/crew';
import { type FreshDatabase, freshDatabase } from '#tests/make/database';
import { makeScreen } from '#tests/make/night';
import { bodyOf, sceneDraft } from '#tests/make/planning';

let fresh: FreshDatabase;
let db: Database;
let lead: Caller;
let showId: string;
let files = 0;

beforeAll(async () => {
  fresh = await freshDatabase();
  db = connect(fresh.url);
});
beforeEach(async () => {
  lead = await makeCrew(db);
  showId = await makeShow(db, lead.crewId, [makeScreen('back', 0), makeScreen('left', -4)]);
});
afterAll(async () => {
  await db.close();
  await fresh.drop();
});

async function makeFile(kind: 'clip' | 'still', state: 'ready' | 'waiting'): Promise<string> {
  files += 1;
  const { crewId } = lead;
  const file = `${'a'.repeat(60)}${files}.mp4`;
  const size = { bytes: 10, width: 640, height: 360, durationS: 2, fps: 25 };
  const row = await db.assets.create({
    id: `file-${files}`,
    crewId,
    kind,
    state,
    name: 'file',
    file,
    ...size,
  });
  return row.id;
}

const clip = (assetId: string): Source => ({ kind: 'clip', assetId, rate: 1, fitBars: null });
const withFiles = (...sources: Source[]) =>
  bodyOf({ layers: sources.map((source, at) => ({ ...newLayer(source.kind, `l${at}`), source })) });
const read = async () => {
  const found = await showManifest(db, showId);
  if (!found) throw new Error('No manifest.');
  return found;
};

describe('the manifest of a show', () => {
  it('has screens of its venue, newest scenes, and what the hub keeps beside them', async () => {
    const made = await makeScene(db, lead, showId, sceneDraft('Tide'));
    const red = { ...sceneDraft('Tide in red', null, bodyOf({ ground: '#ff0000' })), expectedVersion: 1 };
    await saveScene(db, lead, made.id, red);
    await db.displays.create({ id: `d-${showId}`, showId, name: 'House left' });
    const found = await read();
    manifestSchema.parse(found.manifest);
    expect(found).toMatchObject({ crewId: lead.crewId, mode: 'plan', phaseIds: [] });
    expect(found.displayNames).toEqual({ [`d-${showId}`]: 'House left' });
    expect(found.manifest.screens.map(({ id }) => id)).toEqual(['back', 'left']);
    expect(found.manifest.scenes).toMatchObject([
      { name: 'Tide in red', version: 2, body: { ground: '#ff0000' } },
    ]);
  });

  it('has ready files that its scenes use, each once, and no others', async () => {
    const [used, still, waiting] = [
      await makeFile('clip', 'ready'),
      await makeFile('still', 'ready'),
      await makeFile('clip', 'waiting'),
    ];
    await makeFile('clip', 'ready');
    const stills: Source = { kind: 'stills', assetIds: [still, still], everyBeats: 4, seed: 1 };
    const body = withFiles(clip(used), clip(used), clip(waiting), stills);
    await makeScene(db, lead, showId, sceneDraft('Clips', null, body));
    const { assets } = (await read()).manifest;
    expect(assets.map(({ id }) => id)).toEqual([used, still].sort());
    expect(assets[0]?.url).toMatch(/^\/media\/a+\d+\.mp4$/);
  });

  it('has the same revision for the same content, another for other content', async () => {
    const waiting = await makeFile('clip', 'waiting');
    const scene = await makeScene(db, lead, showId, sceneDraft('Clip', null, withFiles(clip(waiting))));
    const revision = async () => (await read()).manifest.revision;
    const first = await revision();
    expect(await revision()).toBe(first);
    await db.assets.update({ state: 'ready' }, { where: { id: waiting } });
    const second = await revision();
    expect(second).not.toBe(first);
    await setRemoved(db, lead.crewId, scene.id, true);
    expect(await revision()).not.toBe(second);
    await setRemoved(db, lead.crewId, scene.id, false);
    expect(await revision()).toBe(second);
  });

  it('of no show is null', async () => {
    expect(await showManifest(db, 'nowhere')).toBeNull();
  });

  it('leaves out closed shows where all shows of a crew are told', async () => {
    const closed = await makeShow(db, lead.crewId, []);
    await db.shows.update({ mode: 'closed' }, { where: { id: closed } });
    expect(await openShowIds(db, lead.crewId)).toEqual([showId]);
  });
});

describe('uses of a file', () => {
  it('are the scenes that are there, once each, of the crew alone', async () => {
    const used = await makeFile('clip', 'ready');
    const draft = (name: string) => sceneDraft(name, null, withFiles(clip(used), clip(used)));
    const kept = await makeScene(db, lead, showId, draft('Kept'));
    const removed = await makeScene(db, lead, showId, draft('Removed'));
    await setRemoved(db, lead.crewId, removed.id, true);
    const uses = await assetUses(db, lead.crewId);
    expect(uses.get(used)).toEqual([{ sceneId: kept.id, sceneName: 'Kept', showId }]);
    const other = await makeCrew(db);
    expect((await assetUses(db, other.crewId)).size).toBe(0);
  });
});
