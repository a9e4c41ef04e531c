import { createHmac, randomBytes, timingSafeEqual } from 'node:crypto';
import { link, mkdir, readFile, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Database } from '#server/models/database';

export const sessionCookieName = 'lampyrid.sid';

/** The key that signs session cookies: made at the first start, readable by the server's account only. */
export async function sessionSecret(dataFolder: string): Promise<string> {
  const path = join(dataFolder, 'session-secret');
  await mkdir(dataFolder, { recursive: true });
  const made = randomBytes(32).toString('base64url');
  const draft = `${path}.${made.slice(0, 8)}`;
  try {
    // Written whole, then named: of two starts at once one names it, and the other never reads half a key.
    await writeFile(draft, made, { mode: 0o600, flag: 'wx' });
    await link(draft, path).catch((error: NodeJS.ErrnoException) => {
      if (error.code === 'EEXIST') throw error;
      // Some drives, such as exFAT, know no links.
      return writeFile(path, made, { mode: 0o600, flag: 'wx' });
    });
    return made;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error;
    return (await readFile(path, 'utf8')).trim();
  } finally {
    await rm(draft, { force: true });
  }
}

/** Text without its percent signs; null for what no browser of ours was given. */
function plain(text: string): string | null {
  try {
    return decodeURIComponent(text);
  } catch {
    return null;
  }
}

/** The cookie's value in a Cookie header. */
function cookieValue(header: string | undefined): string | null {
  for (const part of (header ?? '').split(';')) {
    const at = part.indexOf('=');
    if (part.slice(0, at).trim() === sessionCookieName) return plain(part.slice(at + 1).trim());
  }
  return null;
}

/** Session name in a signed value `s:NAME.SIGNATURE` (HMAC-SHA256, base64 without padding), as express-session makes it. */
export function unsigned(value: string, secret: string): string | null {
  if (!value.startsWith('s:')) return null;
  const dot = value.lastIndexOf('.');
  const name = value.slice(2, dot);
  const wanted = Buffer.from(createHmac('sha256', secret).update(name).digest('base64').replace(/=+$/, ''));
  const given = Buffer.from(value.slice(dot + 1));
  return wanted.length === given.length && timingSafeEqual(wanted, given) ? name : null;
}

/** Whose session a Cookie header carries; null for none, a forged or an ended one. */
export async function readSessionCookie(
  db: Database,
  secret: string,
  header: string | undefined,
): Promise<{ userId: string; sessionId: string; since: string | null } | null> {
  const value = cookieValue(header);
  const sessionId = value ? unsigned(value, secret) : null;
  if (!sessionId) return null;
  const { rows } = await db.pool.query<{ userId: string | null; since: string | null }>(
    `select sess->>'userId' as "userId", sess->>'since' as since from session where sid = $1 and expire > now()`,
    [sessionId],
  );
  const [row] = rows;
  return row?.userId ? { userId: row.userId, sessionId, since: row.since } : null;
}
