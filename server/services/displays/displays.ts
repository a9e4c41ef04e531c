import type { Database } from '#server/models/database';
import type { Display as DisplayRow } from '#server/models/display';
import type { Display, MapVersion } from '#shared/api/displays';
import type { OutputMap } from '#shared/mapping/schema';
import { Fault, notFound } from '../fault';
import { tokenHash } from '../tokens';
import type { Caller, DisplayCaller } from '../who';
import { emptyMap } from './emptyMap';

const answerOf = (row: DisplayRow, map: OutputMap | undefined): Display => ({
  id: row.id,
  showId: row.showId,
  name: row.name,
  raster: row.raster,
  joinedAt: row.joinedAt.toISOString(),
  lastSeenAt: row.lastSeenAt?.toISOString() ?? null,
  mapVersion: row.mapVersion,
  map: map ?? emptyMap(row.raster ?? [1280, 720]),
});

/** Newest map of each display, by display id. */
export async function newestMaps(
  db: Database,
  displays: readonly { id: string; mapVersion: number }[],
): Promise<Map<string, OutputMap>> {
  const wanted = new Map(displays.map(({ id, mapVersion }) => [id, mapVersion]));
  const rows = await db.outputMaps.findAll({ where: { displayId: [...wanted.keys()] } });
  return new Map(
    rows.filter((row) => wanted.get(row.displayId) === row.version).map((row) => [row.displayId, row.map]),
  );
}

/** Joined displays of a show with their newest maps, in the order they joined. */
export async function listDisplays(db: Database, crewId: string, showId: string): Promise<Display[]> {
  const show = await db.shows.findOne({ where: { id: showId, crewId } });
  if (!show) throw notFound('show');
  const rows = await db.displays.findAll({
    where: { showId },
    order: [
      ['joinedAt', 'ASC'],
      ['id', 'ASC'],
    ],
  });
  const maps = await newestMaps(db, rows);
  return rows.map((row) => answerOf(row, maps.get(row.id)));
}

/** A display of the caller's crew, or 404. */
export async function findDisplay(db: Database, crewId: string, id: string): Promise<DisplayRow> {
  const row = await db.displays.findByPk(id);
  const show = row && (await db.shows.findOne({ where: { id: row.showId, crewId } }));
  if (!row || !show) throw notFound('display');
  return row;
}

export async function readDisplay(db: Database, crewId: string, id: string): Promise<Display> {
  const row = await findDisplay(db, crewId, id);
  const maps = await newestMaps(db, [row]);
  return answerOf(row, maps.get(row.id));
}

export async function renameDisplay(
  db: Database,
  crewId: string,
  id: string,
  name: string,
): Promise<Display> {
  const row = await findDisplay(db, crewId, id);
  await row.update({ name });
  return readDisplay(db, crewId, id);
}

/** Takes a display out of its show: its token is void from now on. Returns the show's id. */
export async function forgetDisplay(db: Database, crewId: string, id: string): Promise<string> {
  const row = await findDisplay(db, crewId, id);
  await row.destroy();
  return row.showId;
}

/** Saved versions of a display's map, newest first. */
export async function listMaps(db: Database, crewId: string, id: string): Promise<MapVersion[]> {
  await findDisplay(db, crewId, id);
  const rows = await db.outputMaps.findAll({
    where: { displayId: id },
    order: [['version', 'DESC']],
    limit: 100,
  });
  const people = await db.users.findAll({ where: { id: rows.flatMap((row) => (row.by ? [row.by] : [])) } });
  const names = new Map(people.map((user) => [user.id, user.name]));
  return rows.map((row) => ({
    version: row.version,
    at: row.at.toISOString(),
    by: row.by ? (names.get(row.by) ?? null) : null,
    note: row.note,
    map: row.map,
  }));
}

/**
 * Saves a map as the newest version.
 * @throws Fault 422 when a region names a screen that the venue does not have
 */
export async function saveMap(
  db: Database,
  caller: Caller,
  id: string,
  wanted: { map: OutputMap; note: string },
): Promise<{ showId: string; saved: MapVersion }> {
  const row = await findDisplay(db, caller.crewId, id);
  await refuseUnknownScreens(db, row.showId, wanted.map);
  return db.sequelize.transaction(async (transaction) => {
    const locked = await db.displays.findByPk(id, { transaction, lock: transaction.LOCK.UPDATE });
    if (!locked) throw notFound('display');
    const version = locked.mapVersion + 1;
    const made = await db.outputMaps.create(
      { displayId: id, version, map: wanted.map, note: wanted.note, by: caller.userId },
      { transaction },
    );
    await locked.update({ mapVersion: version }, { transaction });
    const saved = { version, at: made.at.toISOString(), by: caller.name, note: wanted.note, map: wanted.map };
    return { showId: row.showId, saved };
  });
}

async function refuseUnknownScreens(db: Database, showId: string, map: OutputMap): Promise<void> {
  const show = await db.shows.findByPk(showId);
  const venue = show?.venueId ? await db.venues.findByPk(show.venueId) : null;
  const known = new Set(venue?.body.screens.map((screen) => screen.id) ?? []);
  const at = map.regions.findIndex((region) => !known.has(region.screenId));
  if (at < 0) return;
  throw new Fault(
    422,
    'A region takes a screen that this venue does not have.',
    'Choose a screen of the venue, or remove the region.',
    [{ path: `map.regions.${at}.screenId`, message: 'Not a screen of this venue.' }],
  );
}

/** Who holds this device token; null when it is void. */
export async function displayByToken(db: Database, token: string): Promise<DisplayCaller | null> {
  const row = await db.displays.findOne({ where: { tokenHash: tokenHash(token) } });
  const show = row && (await db.shows.findByPk(row.showId));
  return row && show ? { displayId: row.id, showId: show.id, crewId: show.crewId } : null;
}
