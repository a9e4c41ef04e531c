import type { Database } from '#server/models/database';

/** Whether any night is on: heavy work then takes its time. */
export async function anyShowLive(db: Database): Promise<boolean> {
  return (await db.shows.count({ where: { mode: 'live' } })) > 0;
}
