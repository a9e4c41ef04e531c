import { Op } from 'sequelize';
import type { Database } from '#server/models/database';
import type { AsRun } from '#shared/api/shows';
import { findShow } from './shows';

/**
 * What displays reported as drawn in the real room, newest first.
 * @param limit most rows
 * @param after only what was drawn after this hub time, ms
 */
export async function readAsRun(
  db: Database,
  crewId: string,
  showId: string,
  limit: number,
  after: number,
): Promise<AsRun[]> {
  await findShow(db, crewId, showId);
  const rows = await db.asRun.findAll({
    where: { showId, room: 'live', at: { [Op.gt]: after } },
    order: [['at', 'DESC']],
    limit,
  });
  const [displays, scenes] = await Promise.all([
    db.displays.findAll({ where: { showId }, attributes: ['id', 'name'] }),
    db.scenes.findAll({ where: { showId }, attributes: ['id', 'name'] }),
  ]);
  const displayNames = new Map(displays.map(({ id, name }) => [id, name]));
  const sceneNames = new Map(scenes.map(({ id, name }) => [id, name]));
  return rows.map(({ displayId, screenId, sceneId, at, lateMs }) => ({
    displayId,
    displayName: displayNames.get(displayId) ?? 'a display that was forgotten',
    screenId,
    sceneId,
    sceneName: sceneId ? (sceneNames.get(sceneId) ?? null) : null,
    at,
    lateMs,
  }));
}
