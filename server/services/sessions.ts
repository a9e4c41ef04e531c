import { Op } from 'sequelize';
import type { Database } from '#server/models/database';
import type { SignInRecord } from '#shared/api/accounts';
import type { Caller } from './who';

/** What a session holds: who it is, and from where. Roles are looked up anew each time. */
export interface SessionFacts {
  userId?: string;
  /** Name of the session in the table. */
  id?: string;
  sessionId?: string;
  /** ISO time of the sign-in. */
  since?: string | null;
}

/** Longest use of one sign-in however busy it is, ms: thirty days, so that a lost phone ends by itself. */
const longestMs = 30 * 24 * 3_600_000;

const tooOld = (since: string | null | undefined, now: number): boolean =>
  since !== null && since !== undefined && Date.parse(since) + longestMs <= now;

/** The member behind a session; null when nobody is signed in, has been for too long, or is in no crew any more. */
export async function sessionCaller(
  db: Database,
  session: SessionFacts | undefined,
  now = Date.now(),
): Promise<Caller | null> {
  const userId = session?.userId;
  if (!userId || tooOld(session.since, now)) return null;
  const [user, membership] = await Promise.all([db.users.findByPk(userId), db.memberships.findByPk(userId)]);
  if (!user || !membership) return null;
  return {
    userId,
    crewId: membership.crewId,
    role: membership.role,
    name: user.name,
    email: user.email,
    sessionId: session.sessionId ?? session.id ?? '',
  };
}

interface SessionRow {
  sid: string;
  sess: { userId?: string; device?: string; since?: string };
}

/** A session's name is a secret (it is the cookie), so people see a part of it only. */
const shown = (sid: string): string => sid.slice(0, 12);

/** Where a user is signed in, newest first. */
export async function listSessions(db: Database, userId: string, current: string): Promise<SignInRecord[]> {
  const { rows } = await db.pool.query<SessionRow>(
    "select sid, sess from session where sess->>'userId' = $1 and expire > now() order by expire desc",
    [userId],
  );
  return rows.map(({ sid, sess }) => ({
    id: shown(sid),
    device: sess.device ?? 'A browser',
    since: sess.since ?? new Date(0).toISOString(),
    current: sid === current,
  }));
}

/** Ends one session of a user by its shown id. Returns its full name, or null when there is none. */
export async function endSession(db: Database, userId: string, id: string): Promise<string | null> {
  const { rows } = await db.pool.query<{ sid: string }>(
    "delete from session where sess->>'userId' = $1 and left(sid, 12) = $2 returning sid",
    [userId, id],
  );
  return rows[0]?.sid ?? null;
}

/** Ends all sessions of a user but one. Returns the full names of those that ended. */
export async function endOtherSessions(db: Database, userId: string, keep: string | null): Promise<string[]> {
  const { rows } = await db.pool.query<{ sid: string }>(
    "delete from session where sess->>'userId' = $1 and sid <> $2 returning sid",
    [userId, keep ?? ''],
  );
  return rows.map(({ sid }) => sid);
}

/** Removes one-time links that ended more than a day ago. */
export async function sweepLinks(db: Database, now = Date.now()): Promise<void> {
  const dead = new Date(now - 24 * 3_600_000);
  await db.links.destroy({ where: { expiresAt: { [Op.lt]: dead } } });
}
