import type { IncomingMessage } from 'node:http';
import { join } from 'node:path';
import type { Duplex } from 'node:stream';
import { type RawData, type WebSocket, WebSocketServer } from 'ws';
import { z } from 'zod';
import type { HubStore } from '#server/services/hubStore';
import type { Log } from '#server/services/log';
import type { HubShow } from '#server/services/manifest';
import type { SocketCaller } from '#server/services/socketCaller';
import type { OutputMap } from '#shared/mapping/schema';
import { closeCodes, linkTimes } from '#shared/protocol/constants';
import { type ToHub, toHubSchema } from '#shared/protocol/messages';
import { idSchema } from '#shared/scene/schema';
import { may } from '#shared/show/roles';
import { type RoomKind, roomKindSchema } from '#shared/show/state';
import { refusalWords } from '#shared/show/words';
import { hubNow } from './hubClock';
import { type Journal, makeJournal } from './journal';
import { hubLimits, makeDoor } from './limits';
import { Room } from './room';
import { makeSeat, type Seat } from './seat';
import { speakerOf } from './speakers';
import { makeTurns } from './turns';

export interface HubOptions {
  store: HubStore;
  /** Folder for what the database could not take. */
  dataDir: string;
  /** Who opens a socket, by its cookies. */
  authorize: (request: IncomingMessage) => Promise<SocketCaller | null>;
  loadShow: (showId: string) => Promise<HubShow | null>;
  /** Whether host and origin of a request are ours. */
  allowedOrigin: (request: IncomingMessage) => boolean;
  log: Log;
  onEncode?: () => void;
}

export interface Hub {
  handleUpgrade: (request: IncomingMessage, socket: Duplex, head: Buffer) => void;
  manifestChanged: (showId: string) => void;
  mapSaved: (showId: string, displayId: string, version: number, map: OutputMap, by: string | null) => void;
  displaysChanged: (showId: string) => void;
  modeChanged: (showId: string, mode: 'plan' | 'live' | 'closed') => void;
  revoke: (whom: { userId: string } | { displayId: string } | { sessionId: string }) => void;
  /** Resolves once all that was promised to be kept is kept, and every socket is closed. */
  close: () => Promise<void>;
}

const querySchema = z.object({ show: idSchema, room: roomKindSchema, as: z.enum(['crew', 'display']) });
type Query = z.infer<typeof querySchema>;

/** The one place where pages meet: opens sockets, keeps rooms, orders what happens. */
export function createHub(options: HubOptions): Hub {
  const { log, store } = options;
  const sockets = new WebSocketServer({
    noServer: true,
    maxPayload: hubLimits.payload,
    perMessageDeflate: false,
    clientTracking: false,
  });
  const rooms = new Map<string, Promise<Room>>();
  /** Those that are open: one that is still being opened must never hold up the heartbeat of the others. */
  const open = new Map<string, Room>();
  const seats = new Set<Seat>();
  /** Sockets that are being looked up. */
  const arriving = new Set<Duplex>();
  const door = makeDoor(hubLimits.sockets, hubLimits.socketsPerAddress);
  const journal: Journal = makeJournal(store, join(options.dataDir, 'spill'), log, (durable) => {
    for (const room of open.values()) room.tellDurable(durable);
  });
  let closing = false;
  /** How often somebody's right was taken away, so that whoever is just being looked up is looked up again. */
  let revoked = 0;

  const roomOf = (showId: string, room: RoomKind): Promise<Room> => {
    const key = `${showId}/${room}`;
    const known = rooms.get(key);
    if (known) return known;
    const making = openRoom(options, journal, showId, room);
    rooms.set(key, making);
    // A room that could not be opened is tried anew by the next who comes.
    making.then(
      (made) => open.set(key, made),
      () => rooms.delete(key),
    );
    return making;
  };
  const inTurn = makeTurns((error, showId) => log.warn({ err: error, showId }, 'a room was not told'));
  const tell = (showId: string, work: (room: Room) => void | Promise<void>) =>
    inTurn(showId, async () => {
      for (const kind of roomKindSchema.options) {
        const room = rooms.get(`${showId}/${kind}`);
        if (room) await work(await room);
      }
    });
  const refresh = (showId: string) =>
    tell(showId, async (room) => {
      const show = await options.loadShow(showId);
      if (show) return room.refresh(show);
      for (const map of [rooms, open]) map.delete(`${showId}/${room.kind}`);
      room.end();
    });
  const sweep = setInterval(() => {
    cutSilent(seats, hubNow());
    for (const room of open.values()) room.broadcast({ type: 'beat', hubNow: hubNow() });
  }, linkTimes.heartbeat);
  sweep.unref();

  const seatAt = (socket: WebSocket, seat: Seat, room: Room) => {
    seats.add(seat);
    socket.on('error', (error) => log.debug({ err: error }, 'socket'));
    socket.on('message', (data, isBinary) => hear(seat, room, data, isBinary));
    socket.on('close', () => {
      seats.delete(seat);
      room.leave(seat);
    });
  };

  const upgrade = async (request: IncomingMessage, socket: Duplex, head: Buffer): Promise<void> => {
    const address = request.socket.remoteAddress ?? '';
    if (closing) return turnAway(socket, 503, 'The hub stops.');
    if (!options.allowedOrigin(request)) return turnAway(socket, 403, 'Not from a page of ours.');
    if (socket.destroyed) return;
    if (!door.enter(address)) return turnAway(socket, 429, 'Too many sockets.');
    arriving.add(socket);
    socket.once('close', () => {
      arriving.delete(socket);
      door.leave(address);
    });
    const url = new URL(request.url ?? '/', 'http://hub');
    const query = querySchema.safeParse(Object.fromEntries(url.searchParams));
    if (url.pathname !== '/hub' || !query.success) return turnAway(socket, 404, 'There is nothing here.');
    const before = revoked;
    const who = await options.authorize(request);
    if (!who) return turnAway(socket, 401, 'Not signed in.');
    const refused = whyNot(who, query.data);
    if (refused) return turnAway(socket, 403, refused);
    // An open room knows whose it is: a crowd that comes back at once does not read the whole show once each.
    const known = open.get(`${query.data.show}/${query.data.room}`);
    const crewId = known?.crewId ?? (await options.loadShow(query.data.show))?.crewId;
    if (!crewId || (who.kind === 'crew' && who.crewId !== crewId))
      return turnAway(socket, 404, 'There is no such show.');
    const room = await roomOf(query.data.show, query.data.room);
    if (closing || revoked !== before) return turnAway(socket, 503, 'Ask once more.');
    arriving.delete(socket);
    sockets.handleUpgrade(request, socket, head, (made) => {
      const seat = makeSeat(made, socket, who, query.data.show, query.data.room, hubNow());
      seatAt(made, seat, room);
    });
  };

  return {
    handleUpgrade: (request, socket, head) => {
      // A peer that goes away while we look it up must not end the process.
      socket.on('error', () => socket.destroy());
      upgrade(request, socket, head).catch((error: unknown) => {
        log.warn({ err: error }, 'a socket was not opened');
        turnAway(socket, 503, 'The hub could not look you up.');
      });
    },
    manifestChanged: refresh,
    displaysChanged: refresh,
    modeChanged: refresh,
    mapSaved: (showId, displayId, version, map, by) =>
      tell(showId, (room) => room.mapSaved(displayId, version, map, by)),
    revoke: (whom) => {
      revoked += 1;
      for (const seat of seats)
        if (meant(seat.who, whom)) seat.close(closeCodes.notAllowed, 'no longer allowed');
    },
    close: async () => {
      closing = true;
      clearInterval(sweep);
      await Promise.all([...open.values()].map((room) => room.close()));
      await journal.close();
      await hangUp(seats);
      for (const socket of arriving) socket.destroy();
      await store.close();
    },
  };
}

/** Ends sockets that never said hello, and cuts those that said nothing for long. */
function cutSilent(seats: ReadonlySet<Seat>, now: number): void {
  for (const seat of seats) {
    if (!seat.ready && now - seat.openedAt > linkTimes.hello) seat.close(closeCodes.badMessage, 'no hello');
    else if (now - seat.heardAt > linkTimes.idle) seat.cut();
  }
}

/** Says goodbye to all; whoever has not answered after a second is cut. */
async function hangUp(seats: ReadonlySet<Seat>): Promise<void> {
  for (const seat of seats) seat.close(closeCodes.shuttingDown, 'shutting down');
  const until = hubNow() + 1000;
  while (seats.size > 0 && hubNow() < until) await new Promise((resolve) => setTimeout(resolve, 10));
  for (const seat of seats) seat.cut();
}

async function openRoom(
  options: HubOptions,
  journal: Journal,
  showId: string,
  room: RoomKind,
): Promise<Room> {
  const { store, log, onEncode } = options;
  // What an earlier hub could only write to its file comes first.
  await journal.replay();
  const show = await options.loadShow(showId);
  if (!show) throw new Error('There is no such show.');
  const opened = await store.open(showId, room, hubNow());
  return new Room({ showId, room, opened, show, journal, store, log, onEncode });
}

/** Why a caller may not take a seat, or null. */
function whyNot(who: SocketCaller, query: Query): string | null {
  if (!may(who.kind === 'display' ? 'display' : who.role, 'message:hello')) return 'Not for you.';
  if (who.kind === 'crew') return null;
  if (who.showId !== query.show) return 'This display belongs to another show.';
  return query.room === 'live' ? null : 'A display takes no part in a rehearsal.';
}

function meant(who: SocketCaller, whom: Parameters<Hub['revoke']>[0]): boolean {
  if ('displayId' in whom) return who.kind === 'display' && who.displayId === whom.displayId;
  if (who.kind !== 'crew') return false;
  return 'userId' in whom ? who.userId === whom.userId : who.sessionId === whom.sessionId;
}

/** Answers an upgrade with a plain refusal. */
function turnAway(socket: Duplex, status: number, words: string): void {
  if (!socket.writable) return;
  const length = Buffer.byteLength(words);
  socket.end(
    `HTTP/1.1 ${status} ${words.replace(/\.$/, '')}\r\nContent-Type: text/plain\r\nContent-Length: ${length}\r\nConnection: close\r\n\r\n${words}`,
  );
}

/** Reads one message. What cannot be read is answered if it was a command, and counted. */
function hear(seat: Seat, room: Room, data: RawData, isBinary: boolean): void {
  const now = hubNow();
  seat.heardAt = now;
  const json = isBinary ? null : parse(data.toString());
  const asked = timeAsked(json);
  if (asked !== null) return answerTime(seat, asked, now);
  const message = toHubSchema.safeParse(json);
  if (!message.success) return junk(seat, json);
  const { type } = message.data;
  if (type !== 'command' && !seat.within.other(now)) return;
  if (!may(seat.principal, `message:${type}`)) {
    if (message.data.type !== 'command') return junk(seat, null);
    const { id: commandId } = message.data.command;
    return seat.send({ type: 'refused', commandId, code: 'not-allowed', words: refusalWords['not-allowed'] });
  }
  take(seat, room, message.data, now);
}

/**
 * The page's time in a question for the hub's, or null. Checked by hand: every page asks each second, and the full check
 * costs more than the answer.
 */
function timeAsked(json: unknown): number | null {
  if (typeof json !== 'object' || json === null || !('type' in json) || json.type !== 'time') return null;
  return 't1' in json && typeof json.t1 === 'number' ? json.t1 : null;
}

/** Everybody who has been let in may know the time (`message:time` in the role table). */
function answerTime(seat: Seat, t1: number, t2: number): void {
  if (seat.within.other(t2) && may(seat.principal, 'message:time'))
    seat.send({ type: 'time', t1, t2, t3: hubNow() });
}

function take(seat: Seat, room: Room, message: ToHub, now: number): void {
  if (message.type === 'hello') return room.join(seat, message);
  if (message.type === 'time') return answerTime(seat, message.t1, now);
  if (!seat.ready) return junk(seat, null);
  if (message.type === 'command') return room.command(seat, message.command);
  const displayId = speakerOf(message);
  if (displayId === null || !room.speaksFor(seat, displayId)) return junk(seat, null);
  room.report(seat, message, displayId);
}

function parse(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}

const commandIdSchema = z.object({ type: z.literal('command'), command: z.object({ id: idSchema }) });

function junk(seat: Seat, json: unknown): void {
  seat.junk += 1;
  const command = commandIdSchema.safeParse(json);
  if (command.success) {
    const { id: commandId } = command.data.command;
    seat.send({ type: 'refused', commandId, code: 'bad-command', words: refusalWords['bad-command'] });
  }
  if (seat.junk > hubLimits.junk) seat.close(closeCodes.badMessage, 'unreadable');
}
