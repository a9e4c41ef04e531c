import type { Database } from '#server/models/database';
import type { Venue } from '#shared/api/shows';
import type { VenueBody } from '#shared/venue/schema';
import { Fault, notFound } from '../fault';
import { newId } from '../tokens';

interface VenueFacts {
  name: string;
  body: VenueBody;
}

const answerOf = ({ id, name, body }: Venue): Venue => ({ id, name, body });

/** Screens with ids of their own, and groups that name screens of this room only. */
function refuseTangled({ body }: VenueFacts): void {
  const ids = new Set(body.screens.map(({ id }) => id));
  if (ids.size !== body.screens.length)
    throw new Fault(422, 'Two screens have the same id.', 'Remove one and add it anew.', [
      { path: 'body.screens', message: 'Ids are not all different.' },
    ]);
  const at = body.groups.findIndex((group) => group.screenIds.some((id) => !ids.has(id)));
  if (at >= 0)
    throw new Fault(422, 'A group names a screen that the room does not have.', 'Mend the group.', [
      { path: `body.groups.${at}.screenIds`, message: 'Not a screen of this room.' },
    ]);
}

async function find(db: Database, crewId: string, id: string) {
  const row = await db.venues.findOne({ where: { id, crewId } });
  if (!row) throw notFound('venue');
  return row;
}

export async function listVenues(db: Database, crewId: string): Promise<Venue[]> {
  const rows = await db.venues.findAll({ where: { crewId }, order: [['name', 'ASC']] });
  return rows.map(answerOf);
}

export const readVenue = async (db: Database, crewId: string, id: string): Promise<Venue> =>
  answerOf(await find(db, crewId, id));

export async function makeVenue(db: Database, crewId: string, facts: VenueFacts): Promise<Venue> {
  refuseTangled(facts);
  return answerOf(await db.venues.create({ id: newId(), crewId, ...facts }));
}

/** Changes a room. Returns it and the shows that use it. */
export async function editVenue(
  db: Database,
  crewId: string,
  id: string,
  facts: VenueFacts,
): Promise<{ venue: Venue; showIds: string[] }> {
  refuseTangled(facts);
  const row = await find(db, crewId, id);
  await row.update(facts);
  const shows = await db.shows.findAll({ where: { venueId: id }, attributes: ['id'] });
  return { venue: answerOf(row), showIds: shows.map((show) => show.id) };
}

/** @throws Fault 409 while a show is planned in it */
export async function deleteVenue(db: Database, crewId: string, id: string): Promise<void> {
  const row = await find(db, crewId, id);
  const show = await db.shows.findOne({ where: { venueId: id } });
  if (show) throw new Fault(409, `“${show.name}” is in this venue.`, 'Give that show another venue first.');
  await row.destroy();
}
