import type { Database } from '#server/models/database';
import type { Asset } from '#shared/api/assets';
import { assetsOfBody } from '#shared/scene/sourceFiles';
import { listScenesOfShows } from './shows/scenes';

/** Scenes that use each file of a crew, by the file's id. */
export async function assetUses(db: Database, crewId: string): Promise<Map<string, Asset['uses']>> {
  const shows = await db.shows.findAll({ where: { crewId }, attributes: ['id'] });
  const scenes = await listScenesOfShows(
    db,
    shows.map(({ id }) => id),
  );
  const uses = new Map<string, Asset['uses']>();
  for (const scene of scenes)
    for (const assetId of assetsOfBody(scene.body)) {
      const use = { sceneId: scene.id, sceneName: scene.name, showId: scene.showId };
      uses.set(assetId, [...(uses.get(assetId) ?? []), use]);
    }
  return uses;
}
