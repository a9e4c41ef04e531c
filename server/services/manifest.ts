import { createHash } from 'node:crypto';
import { Op } from 'sequelize';
import type { Asset } from '#server/models/asset';
import type { Database } from '#server/models/database';
import type { OutputMap } from '#shared/mapping/schema';
import type { Manifest, ManifestAsset } from '#shared/protocol/messages';
import type { Scene } from '#shared/scene/schema';
import { assetsOfBody } from '#shared/scene/sourceFiles';
import { newestMaps } from './displays/displays';
import { listScenes } from './shows/scenes';

/** What the hub needs to know of a show. */
export interface HubShow {
  crewId: string;
  mode: 'plan' | 'live' | 'closed';
  manifest: Manifest;
  maps: Record<string, OutputMap>;
  displayNames: Record<string, string>;
  phaseIds: string[];
}

/** A file as displays know it; null while it is not ready. */
const manifestAsset = (row: Asset): ManifestAsset | null => {
  const { id, kind, file, bytes, width, height, durationS, fps } = row;
  if (row.state !== 'ready' || !file || !width || !height) return null;
  return { id, kind, url: `/media/${file}`, bytes, width, height, durationS, fps };
};

/** Everything a page needs to draw a show. The same content has the same revision. */
export async function showManifest(db: Database, showId: string): Promise<HubShow | null> {
  const show = await db.shows.findByPk(showId);
  if (!show) return null;
  const [venue, scenes, displays, phases] = await Promise.all([
    show.venueId ? db.venues.findByPk(show.venueId) : null,
    listScenes(db, showId),
    db.displays.findAll({ where: { showId } }),
    db.phases.findAll({ where: { showId }, order: [['position', 'ASC']] }),
  ]);
  const assets = await readyAssets(db, show.crewId, scenes);
  const content = { showName: show.name, screens: venue?.body.screens ?? [], scenes, assets };
  const revision = createHash('sha256').update(JSON.stringify(content)).digest('hex').slice(0, 16);
  return {
    crewId: show.crewId,
    mode: show.mode,
    manifest: { revision, ...content },
    maps: Object.fromEntries(await newestMaps(db, displays)),
    displayNames: Object.fromEntries(displays.map(({ id, name }) => [id, name])),
    phaseIds: phases.map(({ id }) => id),
  };
}

async function readyAssets(db: Database, crewId: string, scenes: readonly Scene[]): Promise<ManifestAsset[]> {
  const wanted = [...new Set(scenes.flatMap((scene) => assetsOfBody(scene.body)))];
  if (wanted.length === 0) return [];
  const rows = await db.assets.findAll({ where: { crewId, id: wanted }, order: [['id', 'ASC']] });
  return rows.flatMap((row) => manifestAsset(row) ?? []);
}

/** Shows of a crew that may still be drawn: not closed. */
export async function openShowIds(db: Database, crewId: string): Promise<string[]> {
  const rows = await db.shows.findAll({ where: { crewId, mode: { [Op.ne]: 'closed' } }, attributes: ['id'] });
  return rows.map(({ id }) => id);
}
