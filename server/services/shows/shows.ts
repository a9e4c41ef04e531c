import { fn, Op } from 'sequelize';
import type { Database } from '#server/models/database';
import type { Show as ShowRow } from '#server/models/show';
import type { Phase, Show, ShowDetail } from '#shared/api/shows';
import { Fault, notFound } from '../fault';
import { newId } from '../tokens';
import type { Caller } from '../who';
import { newPhases } from './newPhases';

/** A show of the caller's crew, or 404. */
export async function findShow(db: Database, crewId: string, id: string): Promise<ShowRow> {
  const row = await db.shows.findOne({ where: { id, crewId } });
  if (!row) throw notFound('show');
  return row;
}

async function countBy(
  model: Database['scenes'] | Database['displays'],
  ids: readonly string[],
  where: object,
): Promise<Map<string, number>> {
  const rows = (await (model as Database['scenes']).findAll({
    attributes: ['showId', [fn('count', '*'), 'count']],
    where: { showId: [...ids], ...where },
    group: ['showId'],
    raw: true,
  })) as unknown as { showId: string; count: string }[];
  return new Map(rows.map(({ showId, count }) => [showId, Number(count)]));
}

async function answersOf(db: Database, rows: readonly ShowRow[]): Promise<Show[]> {
  if (rows.length === 0) return [];
  const ids = rows.map(({ id }) => id);
  const [scenes, displays, venues, brands] = await Promise.all([
    countBy(db.scenes, ids, { deletedAt: null }),
    countBy(db.displays, ids, {}),
    db.venues.findAll({
      where: { id: rows.flatMap(({ venueId }) => venueId ?? []) },
      attributes: ['id', 'name'],
    }),
    db.brands.findAll({
      where: { id: rows.flatMap(({ brandId }) => brandId ?? []) },
      attributes: ['id', 'name'],
    }),
  ]);
  const nameOf = (list: readonly { id: string; name: string }[], id: string | null) =>
    list.find((one) => one.id === id)?.name ?? null;
  return rows.map((row) => ({
    id: row.id,
    name: row.name,
    date: row.date,
    mode: row.mode,
    venueId: row.venueId,
    venueName: nameOf(venues, row.venueId),
    brandId: row.brandId,
    brandName: nameOf(brands, row.brandId),
    client: row.client,
    pictureDelayMs: row.pictureDelayMs,
    openedAt: row.openedAt?.toISOString() ?? null,
    closedAt: row.closedAt?.toISOString() ?? null,
    sceneCount: scenes.get(row.id) ?? 0,
    displayCount: displays.get(row.id) ?? 0,
  }));
}

/** Shows of a crew, the latest night first. */
export async function listShows(db: Database, crewId: string): Promise<Show[]> {
  const rows = await db.shows.findAll({
    where: { crewId },
    order: [
      ['date', 'DESC'],
      ['createdAt', 'DESC'],
    ],
  });
  return answersOf(db, rows);
}

const phaseAnswer = ({
  id,
  name,
  colour,
  startsAt,
  energy,
  brightness,
  flashes,
  position,
}: Phase): Phase => ({
  id,
  name,
  colour,
  startsAt,
  energy,
  brightness,
  flashes,
  position,
});

/** A show with its phases and its room. */
export async function readShow(db: Database, crewId: string, id: string): Promise<ShowDetail> {
  const row = await findShow(db, crewId, id);
  const [[answer], phases, venue] = await Promise.all([
    answersOf(db, [row]),
    db.phases.findAll({ where: { showId: id }, order: [['position', 'ASC']] }),
    row.venueId ? db.venues.findByPk(row.venueId) : null,
  ]);
  if (!answer) throw notFound('show');
  return {
    ...answer,
    phases: phases.map(phaseAnswer),
    venue: venue && { id: venue.id, name: venue.name, body: venue.body },
  };
}

interface ShowFacts {
  name?: string;
  date?: string;
  venueId?: string | null;
  brandId?: string | null;
  client?: string;
}

async function refuseForeign(db: Database, crewId: string, facts: ShowFacts): Promise<void> {
  if (facts.venueId && !(await db.venues.findOne({ where: { id: facts.venueId, crewId } })))
    throw new Fault(422, 'There is no such venue.', 'Choose a venue of your crew.', [
      { path: 'venueId', message: 'Not a venue of your crew.' },
    ]);
  if (facts.brandId && !(await db.brands.findOne({ where: { id: facts.brandId, crewId } })))
    throw new Fault(422, 'There is no such brand.', 'Choose a brand of your crew.', [
      { path: 'brandId', message: 'Not a brand of your crew.' },
    ]);
}

/** Makes a show with the usual phases, or those given. */
export async function makeShow(
  db: Database,
  crewId: string,
  facts: ShowFacts & { name: string; date: string },
  phases: readonly Phase[] = newPhases(),
): Promise<Show> {
  await refuseForeign(db, crewId, facts);
  const id = newId();
  await db.sequelize.transaction(async (transaction) => {
    await db.shows.create({ id, crewId, ...facts }, { transaction });
    await db.phases.bulkCreate(
      phases.map((phase) => ({ ...phase, showId: id })),
      { transaction },
    );
  });
  return readShow(db, crewId, id);
}

/** A closed night is a record. */
function refuseClosed(row: ShowRow): void {
  if (row.mode === 'closed') throw new Fault(409, 'This night is closed.', 'Copy it to plan another.');
}

/** Changes what is known of a show; a closed night is a record and stays as it was. */
export async function editShow(db: Database, crewId: string, id: string, facts: ShowFacts): Promise<Show> {
  const row = await findShow(db, crewId, id);
  refuseClosed(row);
  if (row.mode === 'live' && facts.venueId === null)
    throw new Fault(
      409,
      'This night is on: it needs its venue.',
      'Choose another venue, or close it first.',
      [{ path: 'venueId', message: 'Needed while the night is on.' }],
    );
  await refuseForeign(db, crewId, facts);
  await row.update(facts);
  return readShow(db, crewId, id);
}

/** Removes a show and all that belongs to it. */
export async function deleteShow(db: Database, crewId: string, id: string): Promise<void> {
  const row = await findShow(db, crewId, id);
  if (row.mode === 'live') throw new Fault(409, 'This night is on.', 'Close it first.');
  await row.destroy();
}

/**
 * Opens or closes a night.
 * @throws Fault 409 when it is not the time for that, with the reason
 */
export async function setMode(
  db: Database,
  crewId: string,
  id: string,
  act: 'open' | 'close',
): Promise<Show> {
  const row = await findShow(db, crewId, id);
  if (act === 'open') {
    if (!row.venueId) throw new Fault(409, 'This show has no venue.', 'Choose a venue on Plan first.');
    // Closed by mistake at two in the morning: the same night goes on, under the time it was first opened.
    if (row.mode !== 'live')
      await row.update({ mode: 'live', openedAt: row.openedAt ?? new Date(), closedAt: null });
  } else {
    if (row.mode === 'plan') throw new Fault(409, 'This night has not been opened.', 'Open it first.');
    if (row.mode === 'live') await row.update({ mode: 'closed', closedAt: new Date() });
  }
  return readShow(db, crewId, id);
}

/** Replaces the phases of a show. Ids that stay keep their scenes; scenes of removed phases have none. */
export async function savePhases(
  db: Database,
  crewId: string,
  id: string,
  phases: readonly Phase[],
): Promise<Phase[]> {
  refuseClosed(await findShow(db, crewId, id));
  const ids = new Set(phases.map((phase) => phase.id));
  if (ids.size !== phases.length)
    throw new Fault(422, 'Two phases have the same id.', 'Reload the page and try again.');
  const foreign = await db.phases.count({ where: { id: [...ids], showId: { [Op.ne]: id } } });
  if (foreign > 0) throw new Fault(422, 'A phase belongs to another show.', 'Reload the page and try again.');
  const rows = phases.map((phase, position) => ({ ...phaseAnswer(phase), position, showId: id }));
  await db.sequelize.transaction(async (transaction) => {
    await db.phases.destroy({ where: { showId: id, id: { [Op.notIn]: [...ids] } }, transaction });
    for (const row of rows) await db.phases.upsert(row, { transaction });
  });
  return rows.map(phaseAnswer);
}

/** Copies a show to another date: phases and scenes, no displays, in plan mode. */
export async function cloneShow(
  db: Database,
  caller: Caller,
  id: string,
  wanted: { name: string; date: string },
): Promise<Show> {
  const from = await readShow(db, caller.crewId, id);
  const phaseIds = new Map(from.phases.map((phase) => [phase.id, newId()]));
  const phases = from.phases.map((phase) => ({ ...phase, id: phaseIds.get(phase.id) ?? newId() }));
  const { venueId, brandId, client } = from;
  const made = await makeShow(db, caller.crewId, { ...wanted, venueId, brandId, client }, phases);
  const scenes = await db.scenes.findAll({ where: { showId: id, deletedAt: null } });
  await db.sequelize.transaction(async (transaction) => {
    for (const { id: sceneId, version, name, energy, position, phaseId } of scenes) {
      const found = await db.sceneVersions.findOne({ where: { sceneId, version }, transaction });
      if (!found) continue;
      const copy = newId();
      const phase = phaseId ? (phaseIds.get(phaseId) ?? null) : null;
      await db.scenes.create(
        { id: copy, showId: made.id, name, phaseId: phase, energy, position, version: 1 },
        { transaction },
      );
      await db.sceneVersions.create(
        { sceneId: copy, version: 1, body: found.body, by: caller.userId },
        { transaction },
      );
    }
  });
  return readShow(db, caller.crewId, made.id);
}
