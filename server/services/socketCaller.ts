import type { IncomingMessage } from 'node:http';
import type { Database } from '#server/models/database';
import type { Role } from '#shared/show/roles';
import { displayByToken } from './displays/displays';
import { tokenInCookie } from './displays/tokenInCookie';
import { readSessionCookie } from './sessionCookie';
import { sessionCaller } from './sessions';

export type SocketCaller =
  | { kind: 'crew'; userId: string; crewId: string; role: Role; sessionId: string }
  | { kind: 'display'; displayId: string; showId: string };

/** Who opens a socket, by the cookie that `as` in the address asks for; null for nobody we know. */
export async function authorizeSocket(
  db: Database,
  secret: string,
  request: IncomingMessage,
): Promise<SocketCaller | null> {
  const as = new URL(request.url ?? '/', 'http://hub').searchParams.get('as');
  const { cookie } = request.headers;
  if (as === 'display') {
    const token = tokenInCookie(cookie);
    const found = token ? await displayByToken(db, token) : null;
    return found ? { kind: 'display', displayId: found.displayId, showId: found.showId } : null;
  }
  const session = await readSessionCookie(db, secret, cookie);
  const caller = session && (await sessionCaller(db, session));
  if (!session || !caller) return null;
  const { userId, crewId, role } = caller;
  return { kind: 'crew', userId, crewId, role, sessionId: session.sessionId };
}
