import { mkdtempSync, rmSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { WebSocket } from 'ws';
import { createHub, type Hub, type HubOptions } from '#server/hub/hub';
import { connect, type Database } from '#server/models/database';
import { makeHubStore } from '#server/services/hubStore';
import { makeLog } from '#server/services/log';
import { showManifest } from '#server/services/manifest';
import { makeScene } from '#server/services/shows/scenes';
import type { SocketCaller } from '#server/services/socketCaller';
import { tokenHash } from '#server/services/tokens';
import type { Caller } from '#server/services/who';
import { protocolVersion } from '#shared/protocol/constants';
import type { FromHub, ToHub, Welcome } from '#shared/protocol/messages';
import { drawingSource, newBody, newLayer } from '#shared/scene/defaults';
import type { CommandBody } from '#shared/show/commands';
import type { Role } from '#shared/show/roles';
import type { RoomKind } from '#shared/show/state';
import { makeCrew, makeMember, makeShow } from '#tests/make/crew';
import { freshDatabase } from '#tests/make/database';
import { makeScreen } from '#tests/make/night';

/** A socket's other end in a test: keeps what the hub says. */
export class TestSocket {
  readonly heard: FromHub[] = [];
  private readonly waiting = new Set<() => void>();
  closedWith: number | null = null;

  constructor(readonly socket: WebSocket) {
    socket.on('message', (data) => {
      this.heard.push(JSON.parse(data.toString()) as FromHub);
      for (const check of this.waiting) check();
    });
    socket.on('close', (code) => {
      this.closedWith = code;
      for (const check of this.waiting) check();
    });
    socket.on('error', () => undefined);
  }

  put(message: ToHub | string): void {
    this.socket.send(typeof message === 'string' ? message : JSON.stringify(message));
  }

  /** The first message, heard or to come, that fits. */
  next<T extends FromHub['type']>(
    type: T,
    fits: (message: Extract<FromHub, { type: T }>) => boolean = () => true,
  ): Promise<Extract<FromHub, { type: T }>> {
    return this.until(() =>
      this.heard.find(
        (message): message is Extract<FromHub, { type: T }> =>
          message.type === type && fits(message as Extract<FromHub, { type: T }>),
      ),
    );
  }

  closed(): Promise<number> {
    return this.until(() => this.closedWith ?? undefined);
  }

  private until<T>(look: () => T | undefined): Promise<T> {
    return new Promise((resolve) => {
      const check = () => {
        const found = look();
        if (found === undefined) return;
        this.waiting.delete(check);
        resolve(found);
      };
      this.waiting.add(check);
      check();
    });
  }

  async join(): Promise<Welcome> {
    this.put({ type: 'hello', protocol: protocolVersion, epoch: null, revision: null });
    return this.next('welcome');
  }

  /** Sends a command as a page does, with hub time from the machine (it is the same here). */
  command(id: string, body: CommandBody, lifeMs = 2000): void {
    const expiresAt = performance.timeOrigin + performance.now() + lifeMs;
    this.put({ type: 'command', command: { id, expiresAt, body } });
  }

  answer(id: string): Promise<Extract<FromHub, { type: 'taken' | 'refused' }>> {
    return this.until(() =>
      this.heard.find(
        (message): message is Extract<FromHub, { type: 'taken' | 'refused' }> =>
          (message.type === 'taken' || message.type === 'refused') && message.commandId === id,
      ),
    );
  }
}

export interface HubHouse {
  db: Database;
  databaseUrl: string;
  hub: Hub;
  address: string;
  lead: Caller;
  showId: string;
  sceneId: string;
  displayId: string;
  dataDir: string;
  encodes: () => number;
  member: (role: Role) => Promise<Caller>;
  /** Opens a socket as a member, or as the display when left out; not joined yet. */
  open: (who?: Caller, room?: RoomKind) => Promise<TestSocket>;
  /** What a request is answered with when it is not let in. */
  refused: (path: string, headers: Record<string, string>) => Promise<number>;
  /** Hangs up every socket. */
  hangUp: () => void;
  /** Stops hearing without a word, as a killed process, and starts another hub on the same database. */
  restart: (kill: boolean) => Promise<void>;
  close: () => Promise<void>;
}

const secretOf = (who: Caller | undefined) => (who ? `user=${who.userId}` : 'device=1');

/** A hub on real sockets and real PostgreSQL, with a show of one scene and a joined display. */
export async function makeHubHouse(change: Partial<HubOptions> = {}): Promise<HubHouse> {
  const fresh = await freshDatabase();
  const db = connect(fresh.url);
  const dataDir = mkdtempSync(join(tmpdir(), 'lampyrid-hub-'));
  const lead = await makeCrew(db);
  const showId = await makeShow(db, lead.crewId, [makeScreen('back', 0), makeScreen('left', -4)]);
  const layer = { ...newLayer('drawing', 'l1'), source: drawingSource('tide') };
  const body = { ...newBody(), layers: [layer], dials: [{ name: 'Glow', value: 0.5 }] };
  const scene = await makeScene(db, lead, showId, { name: 'Low tide', phaseId: null, energy: 2, body });
  const display = await db.displays.create({
    id: `display-${showId}`,
    showId,
    name: 'House left',
    tokenHash: tokenHash(showId),
  });
  const people = new Map<string, Caller>([[lead.userId, lead]]);
  let encodes = 0;
  const authorize = async (request: { headers: { cookie?: string } }): Promise<SocketCaller | null> => {
    const [kind, id = ''] = (request.headers.cookie ?? '').split('=');
    if (kind === 'device') return { kind: 'display', displayId: display.id, showId };
    const caller = people.get(id);
    return caller ? { kind: 'crew', ...caller } : null;
  };
  const make = () =>
    createHub({
      store: makeHubStore(db, fresh.url),
      dataDir,
      authorize,
      loadShow: (id) => showManifest(db, id),
      allowedOrigin: (request) => request.headers.origin === 'http://here',
      log: makeLog('silent'),
      onEncode: () => {
        encodes += 1;
      },
      ...change,
    });
  let hub = make();
  const http: Server = createServer();
  http.on('upgrade', (request, socket, head) => hub.handleUpgrade(request, socket, head));
  await new Promise<void>((resolve) => http.listen(0, '127.0.0.1', () => resolve()));
  const address = `127.0.0.1:${(http.address() as AddressInfo).port}`;
  const sockets = new Set<WebSocket>();
  const dial = (path: string, headers: Record<string, string>): WebSocket => {
    const socket = new WebSocket(`ws://${address}${path}`, { headers });
    sockets.add(socket);
    return socket;
  };
  return {
    db,
    databaseUrl: fresh.url,
    get hub() {
      return hub;
    },
    address,
    lead,
    showId,
    sceneId: scene.id,
    displayId: display.id,
    dataDir,
    encodes: () => encodes,
    member: async (role) => {
      const caller = await makeMember(db, lead.crewId, role);
      people.set(caller.userId, caller);
      return caller;
    },
    open: (who, room = 'live') =>
      new Promise((resolve, reject) => {
        const as = who ? 'crew' : 'display';
        const path = `/hub?show=${showId}&room=${room}&as=${as}`;
        const socket = dial(path, { origin: 'http://here', cookie: secretOf(who) });
        const test = new TestSocket(socket);
        socket.on('open', () => resolve(test));
        socket.on('error', reject);
      }),
    refused: (path, headers) =>
      new Promise((resolve) => {
        const socket = dial(path, headers);
        socket.on('error', () => undefined);
        socket.on('unexpected-response', (_request, response) => {
          resolve(response.statusCode ?? 0);
          response.destroy();
        });
        socket.on('open', () => resolve(101));
      }),
    hangUp: () => {
      for (const socket of sockets) socket.terminate();
      sockets.clear();
    },
    restart: async (kill) => {
      if (!kill) await hub.close();
      for (const socket of sockets) socket.terminate();
      hub = make();
    },
    close: async () => {
      for (const socket of sockets) socket.terminate();
      await hub.close();
      await new Promise((resolve) => http.close(resolve));
      await db.close();
      await fresh.drop();
      rmSync(dataDir, { recursive: true, force: true });
    },
  };
}
