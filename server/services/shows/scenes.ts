import { Op, type Transaction } from 'sequelize';
import type { Database } from '#server/models/database';
import type { Scene as SceneRow } from '#server/models/scene';
import type { SceneVersion } from '#shared/api/shows';
import type { Scene, SceneBody } from '#shared/scene/schema';
import { filesOfSource } from '#shared/scene/sourceFiles';
import { Fault, notFound } from '../fault';
import { newId } from '../tokens';
import type { Caller } from '../who';

/** What a person writes of a scene. */
export interface SceneDraft {
  name: string;
  phaseId: string | null;
  energy: number;
  body: SceneBody;
}

const answerOf = (row: SceneRow, body: SceneBody): Scene => ({
  id: row.id,
  showId: row.showId,
  name: row.name,
  phaseId: row.phaseId,
  energy: row.energy,
  position: row.position,
  version: row.version,
  body,
});

/** Newest versions of all scenes of some shows, in their order. */
export async function listScenesOfShows(db: Database, showIds: readonly string[]): Promise<Scene[]> {
  if (showIds.length === 0) return [];
  const rows = await db.scenes.findAll({
    where: { showId: [...showIds], deletedAt: null },
    order: [
      ['position', 'ASC'],
      ['createdAt', 'ASC'],
    ],
  });
  if (rows.length === 0) return [];
  const versions = await db.sceneVersions.findAll({
    where: { [Op.or]: rows.map(({ id, version }) => ({ sceneId: id, version })) },
  });
  const bodies = new Map(versions.map(({ sceneId, body }) => [sceneId, body]));
  return rows.flatMap((row) => {
    const body = bodies.get(row.id);
    return body ? [answerOf(row, body)] : [];
  });
}

/** Newest versions of a show's scenes, in their order. */
export const listScenes = (db: Database, showId: string): Promise<Scene[]> => listScenesOfShows(db, [showId]);

/** A scene of the caller's crew, or 404. A removed one is found when asked for. */
export async function findScene(
  db: Database,
  crewId: string,
  id: string,
  removedToo = false,
): Promise<SceneRow> {
  const row = await db.scenes.findByPk(id);
  const show = row && (await db.shows.findOne({ where: { id: row.showId, crewId } }));
  if (!row || !show || (row.deletedAt && !removedToo)) throw notFound('scene');
  return row;
}

/** A scene with its newest body, or that of an older version. */
export async function readScene(db: Database, crewId: string, id: string, version?: number): Promise<Scene> {
  const row = await findScene(db, crewId, id);
  const found = await db.sceneVersions.findOne({ where: { sceneId: id, version: version ?? row.version } });
  if (!found) throw notFound('version');
  return { ...answerOf(row, found.body), version: found.version };
}

async function refuseForeign(db: Database, crewId: string, showId: string, draft: SceneDraft): Promise<void> {
  if (draft.phaseId && !(await db.phases.findOne({ where: { id: draft.phaseId, showId } })))
    throw new Fault(422, 'This phase is not of this show.', 'Choose another phase.', [
      { path: 'phaseId', message: 'Not a phase of this show.' },
    ]);
  for (const [at, layer] of draft.body.layers.entries()) {
    const ids = [...new Set(filesOfSource(layer.source))];
    const known = ids.length === 0 ? 0 : await db.assets.count({ where: { crewId, id: ids } });
    if (known !== ids.length)
      throw new Fault(
        422,
        `Layer “${layer.name}” uses a file that is not in the Library.`,
        'Choose another file.',
        [{ path: `body.layers.${at}.source`, message: 'Not in the Library.' }],
      );
  }
}

async function makeRows(
  db: Database,
  showId: string,
  draft: SceneDraft,
  by: string | null,
  transaction: Transaction,
): Promise<Scene> {
  const last = (await db.scenes.max('position', { where: { showId }, transaction })) as number | null;
  const row = await db.scenes.create(
    {
      id: newId(),
      showId,
      name: draft.name,
      phaseId: draft.phaseId,
      energy: draft.energy,
      position: (last ?? -1) + 1,
      version: 1,
    },
    { transaction },
  );
  await db.sceneVersions.create({ sceneId: row.id, version: 1, body: draft.body, by }, { transaction });
  return answerOf(row, draft.body);
}

/** Makes a scene at the end of a show's list. */
export async function makeScene(
  db: Database,
  who: Pick<Caller, 'crewId'> & { userId: string | null },
  showId: string,
  draft: SceneDraft,
): Promise<Scene> {
  if (!(await db.shows.findOne({ where: { id: showId, crewId: who.crewId } }))) throw notFound('show');
  await refuseForeign(db, who.crewId, showId, draft);
  return db.sequelize.transaction((transaction) => makeRows(db, showId, draft, who.userId, transaction));
}

/**
 * Saves a scene as its next version.
 * @throws Fault 409 when somebody has saved since `expectedVersion`
 */
export async function saveScene(
  db: Database,
  caller: Pick<Caller, 'crewId'> & { userId: string | null },
  id: string,
  draft: SceneDraft & { expectedVersion: number },
): Promise<Scene> {
  const found = await findScene(db, caller.crewId, id);
  await refuseForeign(db, caller.crewId, found.showId, draft);
  return db.sequelize.transaction(async (transaction) => {
    const row = await db.scenes.findByPk(id, { transaction, lock: transaction.LOCK.UPDATE });
    if (!row) throw notFound('scene');
    if (row.version !== draft.expectedVersion)
      throw new Fault(
        409,
        `Somebody else has saved version ${row.version} meanwhile.`,
        'Take theirs, or save yours as a copy.',
      );
    const version = row.version + 1;
    await db.sceneVersions.create(
      { sceneId: id, version, body: draft.body, by: caller.userId },
      { transaction },
    );
    const { name, phaseId, energy } = draft;
    await row.update({ name, phaseId, energy, version }, { transaction });
    return answerOf(row, draft.body);
  });
}

/** A copy at the end of the list, at version 1. */
export async function duplicateScene(db: Database, caller: Caller, id: string): Promise<Scene> {
  const { showId, name, phaseId, energy, body } = await readScene(db, caller.crewId, id);
  const draft = { name: `${name} (copy)`.slice(0, 60), phaseId, energy, body };
  return db.sequelize.transaction((transaction) => makeRows(db, showId, draft, caller.userId, transaction));
}

/** Takes a scene out of its show, or puts it back; its versions stay. Returns the show's id. */
export async function setRemoved(
  db: Database,
  crewId: string,
  id: string,
  removed: boolean,
): Promise<string> {
  const row = await findScene(db, crewId, id, true);
  await row.update({ deletedAt: removed ? new Date() : null });
  return row.showId;
}

/** Versions of a scene, newest first. */
export async function listSceneVersions(db: Database, crewId: string, id: string): Promise<SceneVersion[]> {
  await findScene(db, crewId, id);
  const rows = await db.sceneVersions.findAll({
    where: { sceneId: id },
    order: [['version', 'DESC']],
    limit: 200,
  });
  const people = await db.users.findAll({ where: { id: rows.flatMap(({ by }) => by ?? []) } });
  const names = new Map(people.map((user) => [user.id, user.name]));
  return rows.map(({ version, at, by }) => ({
    version,
    at: at.toISOString(),
    by: by ? (names.get(by) ?? null) : null,
  }));
}
