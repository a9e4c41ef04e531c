import { mkdtempSync, readFileSync, rmSync, statSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { connect, type Database } from '#server/models/database';
import { readSessionCookie, sessionSecret } from '#server/services/sessionCookie';
import { endOtherSessions, endSession, listSessions, sessionCaller } from '#server/services/sessions';
import type { Caller } from '#server/services/who';
import { makeCrew } from '#tests/make/crew';
import { type FreshDatabase, freshDatabase } from '#tests/make/database';

/** The package that express-session signs with; it has no types. */
const { sign } = createRequire(import.meta.url)('cookie-signature') as {
  sign: (value: string, secret: string) => string;
};

let fresh: FreshDatabase;
let db: Database;
let lead: Caller;
const secret = 'a secret for tests only';
const since = '2026-12-05T18:00:00.000Z';

/** A session as express-session leaves it in the table. */
async function keep(sid: string, userId: string | null, ends = '1 day'): Promise<string> {
  await db.pool.query('insert into session (sid, sess, expire) values ($1, $2, now() + $3::interval)', [
    sid,
    JSON.stringify({ cookie: {}, ...(userId && { userId, since, device: 'Firefox on Linux' }) }),
    ends,
  ]);
  return `other=1; lampyrid.sid=${encodeURIComponent(`s:${sign(sid, secret)}`)}`;
}

beforeAll(async () => {
  fresh = await freshDatabase();
  db = connect(fresh.url);
  lead = await makeCrew(db);
});
afterAll(async () => {
  await db.close();
  await fresh.drop();
});

describe('the cookie of a session', () => {
  it('names the member while the session lasts', async () => {
    const cookie = await keep('lasting-session-1', lead.userId);
    expect(await readSessionCookie(db, secret, cookie)).toEqual({
      userId: lead.userId,
      sessionId: 'lasting-session-1',
      since,
    });
    expect(
      await readSessionCookie(db, secret, await keep('ended-session-1', lead.userId, '-1 s')),
    ).toBeNull();
    expect(await readSessionCookie(db, secret, await keep('visitor-session-1', null))).toBeNull();
  });

  it.each([
    ['none', undefined],
    ['another secret’s', `lampyrid.sid=${encodeURIComponent(`s:${sign('lasting-session-1', 'other')}`)}`],
    ['an unsigned one', 'lampyrid.sid=lasting-session-1'],
    ['a cut one', 'lampyrid.sid=s%3A'],
    ['broken percent signs', 'lampyrid.sid=%E0%A4%A'],
    ['a name alone', 'lampyrid.sid'],
  ])('is nobody’s when it is %s', async (_name, cookie) => {
    expect(await readSessionCookie(db, secret, cookie)).toBeNull();
  });
});

describe('a sign-in', () => {
  it('ends after thirty days however busy it is', async () => {
    const session = { userId: lead.userId, id: 'x', since };
    const day = 24 * 3_600_000;
    const from = Date.parse(since);
    expect(await sessionCaller(db, session, from + 30 * day - 1)).toMatchObject({ role: 'lead' });
    expect(await sessionCaller(db, session, from + 30 * day)).toBeNull();
  });

  it('is nobody’s once its member is gone', async () => {
    expect(await sessionCaller(db, { userId: 'gone', id: 'x', since })).toBeNull();
    expect(await sessionCaller(db, undefined)).toBeNull();
  });

  it('is listed without what would open it, and ended by its own member only', async () => {
    const sid = 'listed-session-with-a-long-name';
    await keep(sid, lead.userId);
    const list = await listSessions(db, lead.userId, sid);
    expect(JSON.stringify(list)).not.toContain(sid);
    const mine = list.find((one) => one.current);
    expect(mine).toMatchObject({ device: 'Firefox on Linux', since });
    expect(await endSession(db, 'somebody-else', mine?.id ?? '')).toBeNull();
    expect(await endSession(db, lead.userId, mine?.id ?? '')).toBe(sid);
  });

  it('stays when all others of its member end', async () => {
    const other = await makeCrew(db);
    await keep('mine-here', other.userId);
    await keep('mine-there', other.userId);
    expect(await endOtherSessions(db, other.userId, 'mine-here')).toEqual(['mine-there']);
    expect(await listSessions(db, other.userId, 'mine-here')).toHaveLength(1);
  });
});

describe('the key that signs', () => {
  it('is made once, for the server’s account alone', async () => {
    const folder = mkdtempSync(join(tmpdir(), 'lampyrid-secret-'));
    const [one, two] = await Promise.all([sessionSecret(folder), sessionSecret(folder)]);
    const path = join(folder, 'session-secret');
    expect(one).toMatch(/^[\w-]{43}$/);
    expect([two, await sessionSecret(folder), readFileSync(path, 'utf8')]).toEqual([one, one, one]);
    expect(statSync(path).mode & 0o777).toBe(0o600);
    rmSync(folder, { recursive: true });
  });
});
