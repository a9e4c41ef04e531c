import type { Database } from '#server/models/database';
import type { Caller } from '#server/services/who';
import type { Role } from '#shared/show/roles';
import type { Screen } from '#shared/venue/schema';

let made = 0;
const next = (what: string) => {
  made += 1;
  return `${what}-${made}`;
};

/** A crew with one member of a role, in the database. No one can sign in with its password. */
export async function makeCrew(db: Database, role: Role = 'lead'): Promise<Caller> {
  const crew = await db.crews.create({ id: next('crew'), name: 'Boathouse crew' });
  return makeMember(db, crew.id, role);
}

/** One more member of a crew. */
export async function makeMember(db: Database, crewId: string, role: Role): Promise<Caller> {
  const userId = next('user');
  const email = `${userId}@crew.example`;
  await db.users.create({ id: userId, name: 'Ines Varga', email, passwordHash: 'none' });
  await db.memberships.create({ userId, crewId, role });
  return { userId, crewId, role, name: 'Ines Varga', email, sessionId: 'none' };
}

/** A show of a crew in a venue with these screens. */
export async function makeShow(db: Database, crewId: string, screens: Screen[]): Promise<string> {
  const venue = await db.venues.create({
    id: next('venue'),
    crewId,
    name: 'Boathouse 4',
    body: { ambientLux: 30, screens, groups: [] },
  });
  const show = await db.shows.create({
    id: next('show'),
    crewId,
    name: 'Salt & Static',
    date: '2026-12-05',
    venueId: venue.id,
  });
  return show.id;
}
