import type { Asset as AssetRow } from '#server/models/asset';
import type { Database } from '#server/models/database';
import type { Asset } from '#shared/api/assets';
import { assetUses } from './assetUses';
import { Fault, notFound } from './fault';

const answerOf = (row: AssetRow, uses: Asset['uses'], names: ReadonlyMap<string, string>): Asset => ({
  id: row.id,
  name: row.name,
  kind: row.kind,
  state: row.state,
  progress: row.progress,
  fault: row.fault,
  bytes: row.bytes,
  width: row.width,
  height: row.height,
  durationS: row.durationS,
  fps: row.fps,
  url: row.file && `/media/${row.file}`,
  posterUrl: row.posterFile && `/media/${row.posterFile}`,
  addedAt: row.addedAt.toISOString(),
  addedBy: row.addedBy ? (names.get(row.addedBy) ?? null) : null,
  uses,
});

async function answersOf(db: Database, crewId: string, rows: readonly AssetRow[]): Promise<Asset[]> {
  const [uses, people] = await Promise.all([
    assetUses(db, crewId),
    db.users.findAll({
      where: { id: rows.flatMap(({ addedBy }) => addedBy ?? []) },
      attributes: ['id', 'name'],
    }),
  ]);
  const names = new Map(people.map(({ id, name }) => [id, name]));
  return rows.map((row) => answerOf(row, uses.get(row.id) ?? [], names));
}

/** Files of a crew, newest first. */
export async function listAssets(db: Database, crewId: string): Promise<Asset[]> {
  const rows = await db.assets.findAll({ where: { crewId }, order: [['addedAt', 'DESC']] });
  return answersOf(db, crewId, rows);
}

async function find(db: Database, crewId: string, id: string): Promise<AssetRow> {
  const row = await db.assets.findOne({ where: { id, crewId } });
  if (!row) throw notFound('file');
  return row;
}

export async function readAsset(db: Database, crewId: string, id: string): Promise<Asset> {
  const [answer] = await answersOf(db, crewId, [await find(db, crewId, id)]);
  if (!answer) throw notFound('file');
  return answer;
}

/**
 * Renames a file, or says what it is.
 * @throws Fault 422 when a video would become a picture or the other way round
 */
export async function editAsset(
  db: Database,
  crewId: string,
  id: string,
  change: { name?: string; kind?: Asset['kind'] },
): Promise<Asset> {
  const row = await find(db, crewId, id);
  if (change.kind && (change.kind === 'clip') !== (row.kind === 'clip'))
    throw new Fault(
      422,
      'A video stays a clip, a picture stays a still or a mark.',
      'Choose still or mark.',
      [{ path: 'kind', message: 'Not possible for this file.' }],
    );
  await row.update(change);
  return readAsset(db, crewId, id);
}

/**
 * Removes a file from the Library. The served file stays on disk while another row has the same content.
 * @returns names of served files that nobody has any more
 * @throws Fault 409 while a scene uses it, naming the scene
 */
export async function deleteAsset(db: Database, crewId: string, id: string): Promise<string[]> {
  const row = await find(db, crewId, id);
  const uses = (await assetUses(db, crewId)).get(id) ?? [];
  const [first] = uses;
  if (first)
    throw new Fault(
      409,
      `The scene “${first.sceneName}”${uses.length > 1 ? ` and ${uses.length - 1} more` : ''} shows this file.`,
      'Take it out of the scene first.',
    );
  await row.destroy();
  return ownerless(db, [row.file, row.posterFile]);
}

/** Which of these served files no row has. */
export async function ownerless(db: Database, names: readonly (string | null)[]): Promise<string[]> {
  const free: string[] = [];
  for (const name of names.flatMap((one) => one ?? [])) {
    const others =
      (await db.assets.count({ where: { file: name } })) +
      (await db.assets.count({ where: { posterFile: name } }));
    if (others === 0) free.push(name);
  }
  return free;
}

/** Whether a crew has a served file of this name. */
export async function crewHasFile(db: Database, crewId: string, name: string): Promise<boolean> {
  const [asFile, asPoster] = await Promise.all([
    db.assets.count({ where: { crewId, file: name } }),
    db.assets.count({ where: { crewId, posterFile: name } }),
  ]);
  return asFile + asPoster > 0;
}
