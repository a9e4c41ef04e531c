import { Op } from 'sequelize';
import type { Database } from '#server/models/database';
import type { PairingCode } from '#server/models/pairingCode';
import { Fault } from '../fault';
import { newId, newToken, tokenHash } from '../tokens';
import type { Caller } from '../who';
import { emptyMap } from './emptyMap';
import { newCode } from './secrets';

/** A code lives this long, ms (RFC 8628 section 6.1 leaves it open; OWASP ASVS asks for ten minutes at most). */
const codeLifeMs = 10 * 60_000;
/** Least time between two questions of one display, ms. */
export const pollIntervalMs = 2000;
/** A display that has not asked this long has gone: its code makes room, ms. */
const goneMs = 30_000;
const mostPending = 64;
const mostPendingPerAddress = 24;

export interface Asking {
  raster: [number, number];
  /** Where the display is, as the socket says. */
  address: string;
  browser: string;
}

export interface Asked {
  code: string;
  deviceSecret: string;
  expiresAt: string;
  intervalMs: number;
}

/** Gives a display a code to show and a secret to ask with. */
export async function askPairing(db: Database, asking: Asking, now = Date.now()): Promise<Asked> {
  await db.pairingCodes.destroy({
    where: {
      [Op.or]: [
        { expiresAt: { [Op.lt]: new Date(now) } },
        { displayId: null, polledAt: { [Op.lt]: new Date(now - goneMs) } },
        { displayId: null, polledAt: null, createdAt: { [Op.lt]: new Date(now - goneMs) } },
      ],
    },
  });
  const pending = await db.pairingCodes.count();
  const here = await db.pairingCodes.count({ where: { address: asking.address } });
  if (pending >= mostPending || here >= mostPendingPerAddress)
    throw new Fault(
      429,
      'Too many displays wait to be joined.',
      'Join or close some, then wait half a minute.',
    );
  const deviceSecret = newToken();
  const expiresAt = new Date(now + codeLifeMs);
  const code = await freeCode(db);
  await db.pairingCodes.create({
    code,
    secretHash: tokenHash(deviceSecret),
    raster: asking.raster,
    address: asking.address,
    browser: asking.browser.slice(0, 200),
    intervalMs: pollIntervalMs,
    expiresAt,
    createdAt: new Date(now),
  });
  return { code, deviceSecret, expiresAt: expiresAt.toISOString(), intervalMs: pollIntervalMs };
}

async function freeCode(db: Database): Promise<string> {
  for (;;) {
    const code = newCode();
    if (!(await db.pairingCodes.findByPk(code))) return code;
  }
}

export type Waited =
  | { state: 'pending' | 'slow-down' | 'expired'; displayId: null }
  /** `token` goes into the display's cookie and is kept here as a hash only. */
  | { state: 'joined'; displayId: string; token: string };

/** A display asks whether somebody has joined it. */
export async function waitPairing(db: Database, deviceSecret: string, now = Date.now()): Promise<Waited> {
  const row = await db.pairingCodes.findOne({ where: { secretHash: tokenHash(deviceSecret) } });
  if (!row || row.expiresAt.getTime() <= now) return { state: 'expired', displayId: null };
  const since = row.polledAt ? now - row.polledAt.getTime() : Number.POSITIVE_INFINITY;
  await row.update({ polledAt: new Date(now) });
  if (row.displayId)
    return { state: 'joined', displayId: row.displayId, token: await tokenFor(db, row.displayId) };
  // A little slack: timers of a busy page fire early against a clock that jitters.
  if (since < row.intervalMs * 0.8) return { state: 'slow-down', displayId: null };
  return { state: 'pending', displayId: null };
}

/** Made at each answer, so that an answer that was lost on the way can be asked for again until the code ends. */
async function tokenFor(db: Database, displayId: string): Promise<string> {
  const token = newToken();
  await db.displays.update({ tokenHash: tokenHash(token) }, { where: { id: displayId } });
  return token;
}

/** What waits under a code, for the person who is about to join it. */
export async function lookUpPairing(db: Database, code: string, now = Date.now()): Promise<PairingCode> {
  const row = await db.pairingCodes.findByPk(code);
  if (!row || row.expiresAt.getTime() <= now || row.displayId)
    throw new Fault(
      404,
      `No display waits with ${code}.`,
      'Read the code off the display again; it changes every ten minutes.',
      [{ path: 'code', message: 'No display waits with this code.' }],
    );
  return row;
}

/** Joins the display that waits under a code to a show. Returns the new display's id. */
export async function joinDisplay(
  db: Database,
  caller: Caller,
  wanted: { code: string; showId: string; name: string },
  now = Date.now(),
): Promise<string> {
  const show = await db.shows.findOne({ where: { id: wanted.showId, crewId: caller.crewId } });
  if (!show) throw new Fault(404, 'There is no such show.', 'Choose a show of your crew.');
  const waiting = await lookUpPairing(db, wanted.code, now);
  const id = newId();
  await db.sequelize.transaction(async (transaction) => {
    await db.displays.create(
      {
        id,
        showId: show.id,
        name: wanted.name,
        raster: waiting.raster,
        mapVersion: 1,
        joinedBy: caller.userId,
      },
      { transaction },
    );
    await db.outputMaps.create(
      { displayId: id, version: 1, map: emptyMap(waiting.raster), note: 'Joined', by: caller.userId },
      { transaction },
    );
    const [taken] = await db.pairingCodes.update(
      { displayId: id },
      { where: { code: waiting.code, displayId: null }, transaction },
    );
    if (taken !== 1)
      throw new Fault(409, 'Somebody else has just joined this display.', 'Look for it in the list.');
  });
  return id;
}
