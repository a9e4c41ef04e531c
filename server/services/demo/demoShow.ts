import type { Database } from '#server/models/database';
import type { SceneBody } from '#shared/scene/schema';
import { audit } from '../audit';
import { Fault } from '../fault';
import { makeBrand } from '../shows/brands';
import { listScenes, makeScene, saveScene } from '../shows/scenes';
import { makeShow } from '../shows/shows';
import { makeVenue } from '../shows/venues';
import { newId } from '../tokens';
import { type DemoFile, type DemoFileIds, demoRecipes } from './demoFiles';
import { demoNames, demoPalette, demoPhases, demoVenue } from './night';
import { demoScenes } from './scenes';

interface Who {
  crewId: string;
  userId: string | null;
}

/** Written down so that a show is known as the demo night whatever the crew calls it later. */
const begun = 'demo.begun';
const made = 'demo.made';

/** The crew's demo show, if it has one that was not removed; `whole` once all of it was made. */
export async function findDemoShow(
  db: Database,
  crewId: string,
): Promise<{ id: string; whole: boolean } | null> {
  const entries = await db.auditEntries.findAll({
    where: { crewId, action: [begun, made] },
    order: [['id', 'DESC']],
  });
  const ids = entries.flatMap(({ object }) => object ?? []);
  const show = ids.length > 0 ? await db.shows.findOne({ where: { crewId, id: ids } }) : null;
  if (!show) return null;
  return {
    id: show.id,
    whole: entries.some(({ action, object }) => action === made && object === show.id),
  };
}

export const markDemoMade = (db: Database, who: Who, showId: string): Promise<void> =>
  audit(db, { ...who, action: made, object: showId });

/** The night that a moment belongs to, YYYY-MM-DD: until six in the morning it is still yesterday's. */
export const nightOf = (at: Date): string => {
  const night = new Date(at.getTime() - 6 * 3_600_000);
  return [night.getFullYear(), night.getMonth() + 1, night.getDate()]
    .map((part) => String(part).padStart(2, '0'))
    .join('-');
};

/** Makes venue, brand and show, or takes those that an earlier try has left. Returns the show's id. */
export async function makeDemoShow(db: Database, who: Who, markAssetId: string | null): Promise<string> {
  const found = await findDemoShow(db, who.crewId);
  if (found) return found.id;
  const { crewId } = who;
  const { venue: name, client, show } = demoNames;
  const venue =
    (await db.venues.findOne({ where: { crewId, name } })) ??
    (await makeVenue(db, crewId, { name, body: demoVenue }));
  const brand =
    (await db.brands.findOne({ where: { crewId, name: client } })) ??
    (await makeBrand(db, crewId, { name: client, palette: demoPalette, markAssetId }));
  const phases = demoPhases.map((phase, position) => ({ ...phase, id: newId(), position }));
  const facts = { name: show, date: nightOf(new Date()), venueId: venue.id, brandId: brand.id, client };
  const { id } = await makeShow(db, crewId, facts, phases);
  await audit(db, { ...who, action: begun, object: id });
  return id;
}

/** Makes the scenes that the show does not have yet. */
export async function makeDemoScenes(
  db: Database,
  who: Who,
  showId: string,
  ids: DemoFileIds,
): Promise<void> {
  const phases = await db.phases.findAll({ where: { showId }, order: [['position', 'ASC']] });
  const there = new Set((await db.scenes.findAll({ where: { showId } })).map(({ name }) => name));
  for (const { name, phase, energy, body } of demoScenes(ids))
    if (!there.has(name))
      await makeScene(db, who, showId, { name, energy, body, phaseId: phases[phase]?.id ?? null });
}

const withClip = (body: SceneBody, name: string, assetId: string): SceneBody => ({
  ...body,
  layers: body.layers.map((layer) =>
    layer.name === name && layer.source.kind === 'clip' && layer.source.assetId === null
      ? { ...layer, source: { ...layer.source, assetId } }
      : layer,
  ),
});

/**
 * Puts a clip into the layers that wait for it, as a new version of each scene; what people have changed meanwhile
 * stays.
 */
export async function putClip(
  db: Database,
  who: Who,
  showId: string,
  file: DemoFile,
  assetId: string,
): Promise<void> {
  for (const scene of await listScenes(db, showId)) {
    const body = withClip(scene.body, demoRecipes[file].name, assetId);
    if (JSON.stringify(body) === JSON.stringify(scene.body)) continue;
    const { id, name, phaseId, energy, version: expectedVersion } = scene;
    await saveScene(db, who, id, { name, phaseId, energy, body, expectedVersion }).catch((error: unknown) => {
      // Somebody has saved it in this very moment: theirs stands.
      if (!(error instanceof Fault && error.status === 409)) throw error;
    });
  }
}
