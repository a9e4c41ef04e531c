import { createServer } from 'node:http';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { WebSocket as Socket } from 'ws';
import type { Caller } from '#server/services/who';
import { type HubHouse, makeHubHouse } from '#tests/make/hub';
import type { KeepStore } from '@/link/drawnQueue';
import { createShowLink } from '@/link/showLink';
import type { LinkSnapshot, ShowLink } from '@/link/types';

let house: HubHouse;
const links: ShowLink[] = [];
beforeAll(async () => {
  house = await makeHubHouse();
});
afterEach(() => {
  for (const link of links.splice(0)) link.close();
  house.hangUp();
});
afterAll(() => house.close());

const memory = (): KeepStore => {
  const kept = new Map<string, string>();
  return { getItem: (key) => kept.get(key) ?? null, setItem: (key, value) => void kept.set(key, value) };
};

/** A link as in a page, through a wire that the test can cut. `up` answers the HTTP question. */
function open(who?: Caller, store: KeepStore | null = null) {
  const wire = {
    up: true,
    sockets: [] as Socket[],
    /** What the server answers to a question about this page. */
    known: 200,
    /** How far the page's monotonic clock has fallen behind, ms. */
    slept: 0,
    probes: 0,
    wake: () => {},
  };
  const headers = { origin: 'http://here', cookie: who ? `user=${who.userId}` : 'device=1' };
  class Wired extends Socket {
    constructor(url: string) {
      super(url, { headers });
      this.on('error', () => undefined);
      wire.sockets.push(this);
    }
  }
  const link = createShowLink(
    { showId: house.showId, room: 'live', as: who ? 'crew' : 'display' },
    {
      WebSocket: Wired as unknown as typeof WebSocket,
      fetch: (async (path: string) => {
        if (!wire.up) throw new TypeError('refused');
        if (!String(path).endsWith('/healthz')) return new Response('{}', { status: wire.known });
        wire.probes += 1;
        return new Response('{}');
      }) as typeof fetch,
      now: () => performance.now() - wire.slept,
      origin: `http://${house.address}`,
      store,
      onWake: (wake) => {
        wire.wake = wake;
        return () => {};
      },
    },
  );
  links.push(link);
  const cut = () => {
    for (const socket of wire.sockets.splice(0)) socket.terminate();
  };
  return { link, wire, cut };
}

function until(link: ShowLink, fits: (snapshot: LinkSnapshot) => boolean): Promise<LinkSnapshot> {
  return new Promise((resolve) => {
    const check = () => {
      if (!fits(link.getSnapshot())) return;
      stop();
      resolve(link.getSnapshot());
    };
    const stop = link.subscribe(check);
    check();
  });
}
const on = (link: ShowLink) => until(link, ({ status }) => status === 'on');

describe('a link', () => {
  it('joins, knows the show and keeps the hub’s time', async () => {
    const { link } = open(house.lead);
    const { state, manifest, principal } = await on(link);
    expect([state?.showId, manifest?.scenes.length, principal]).toEqual([house.showId, 1, 'lead']);
    await until(link, ({ clockErrorMs }) => clockErrorMs !== null);
    // The hub runs in this process: its clock is ours.
    expect(Math.abs(link.hubNow() - (performance.timeOrigin + performance.now()))).toBeLessThan(25);
  });

  it('carries a command there and its answer back, and everybody else hears of it', async () => {
    const [phone, display] = [open(house.lead), open()];
    await on(phone.link);
    await on(display.link);
    const answer = await phone.link.send({
      kind: 'scene.trigger',
      screenIds: ['back'],
      sceneId: house.sceneId,
      landsOn: 'now',
    });
    if (answer.outcome !== 'taken') throw new Error(answer.words);
    const { state } = await until(display.link, (known) => known.state?.screens.back?.next != null);
    expect(state?.screens.back?.next?.landsAt).toBe(answer.landsAt);
  });

  it('says why the hub refused', async () => {
    const { link } = open(house.lead);
    await on(link);
    const answer = await link.send({ kind: 'phase.set', phaseId: 'nowhere' });
    expect(answer).toEqual({ outcome: 'refused', code: 'unknown-phase', words: 'Phase is not in show' });
  });

  it('sends nothing while it is away, and nothing of it afterwards', async () => {
    const { link, wire, cut } = open(house.lead);
    await on(link);
    wire.up = false;
    cut();
    await until(link, ({ status }) => status === 'away');
    expect(await link.send({ kind: 'dimmer.set', level: 0.111 })).toEqual({
      outcome: 'not-sent',
      words: 'No link, not sent',
    });
    wire.up = true;
    const { state } = await on(link);
    expect(state?.dimmer).not.toBe(0.111);
    expect(await house.db.showEvents.count({ where: { commandId: 'x' } })).toBe(0);
  });

  it('comes back by itself with what it missed', async () => {
    const [phone, other] = [open(house.lead), open(house.lead)];
    await on(phone.link);
    await on(other.link);
    other.wire.up = false;
    other.cut();
    await until(other.link, ({ status }) => status === 'away');
    await phone.link.send({ kind: 'dimmer.set', level: 0.625 });
    other.wire.up = true;
    const { state } = await until(other.link, (known) => known.status === 'on');
    expect(state?.dimmer).toBe(0.625);
  });

  it('takes over a hub that was started anew, and never an older epoch', async () => {
    const { link, cut } = open(house.lead);
    const before = await on(link);
    await house.restart(true);
    cut();
    const { state } = await until(link, (known) => (known.state?.epoch ?? 0) > (before.state?.epoch ?? 0));
    expect(state?.showId).toBe(house.showId);
  });

  it('keeps drawn reports while it is away and brings them afterwards, each once', async () => {
    const store = memory();
    const first = open(undefined, store);
    await on(first.link);
    first.wire.up = false;
    first.cut();
    await until(first.link, ({ status }) => status === 'away');
    const report = {
      displayId: house.displayId,
      screenId: 'back',
      sceneId: null,
      sceneVersion: null,
      lateMs: 1,
    };
    for (const runId of ['kept-1', 'kept-2']) first.link.reportDrawn({ ...report, runId, at: 1.7e12 });
    // The page is reloaded before the hub is back.
    first.link.close();
    const second = open(undefined, store);
    await on(second.link);
    second.link.reportDrawn({ ...report, runId: 'kept-3', at: 1.7e12 + 1 });
    const runs = async () =>
      (await house.db.asRun.findAll({ where: { displayId: house.displayId }, order: [['seq', 'ASC']] })).map(
        ({ runId, seq }) => [runId, seq],
      );
    await expect.poll(runs).toEqual([
      ['kept-1', 1],
      ['kept-2', 2],
      ['kept-3', 3],
    ]);
  });

  it('that was shut out says so and stays out', async () => {
    const member = await house.member('vj');
    const { link } = open(member);
    await on(link);
    house.hub.revoke({ userId: member.userId });
    const { refusedWhy } = await until(link, ({ status }) => status === 'refused');
    expect(refusedWhy).toContain('sign-in or role');
  });

  it('that the hub lets in no more learns why', async () => {
    const stranger = { ...(await house.member('vj')), userId: 'nobody-here' };
    const { link, wire } = open(stranger);
    wire.known = 401;
    const { refusedWhy } = await until(link, ({ status }) => status === 'refused');
    expect(refusedWhy).toBe('You are signed out: sign in again to go on.');
    const { probes } = wire;
    wire.wake();
    expect(wire.probes).toBe(probes);
  });

  it('tries no faster than the hub refuses while nothing speaks against the page', async () => {
    const stranger = { ...(await house.member('vj')), userId: 'nobody-here' };
    const { link, wire } = open(stranger);
    await expect.poll(() => wire.probes, { timeout: 6000 }).toBe(3);
    const third = performance.now();
    await expect.poll(() => wire.probes, { timeout: 6000, interval: 10 }).toBe(4);
    // After three failures: 4 × 200 ms at the least.
    expect(performance.now() - third).toBeGreaterThan(700);
    expect(link.getSnapshot().status).toBe('joining');
  });

  it('joins at once when the network comes back, whatever pause it is in', async () => {
    const stranger = { ...(await house.member('vj')), userId: 'nobody-here' };
    const { wire } = open(stranger);
    await expect.poll(() => wire.probes, { timeout: 9000, interval: 10 }).toBe(4);
    await expect.poll(() => wire.sockets.length).toBe(4);
    const { socket } = await new Promise<{ socket: Socket }>((resolve) => {
      const last = wire.sockets[3];
      if (!last) throw new Error('no socket');
      if (last.readyState === Socket.CLOSED) resolve({ socket: last });
      else last.on('close', () => resolve({ socket: last }));
    });
    expect(socket.readyState).toBe(Socket.CLOSED);
    await expect
      .poll(
        () => {
          wire.wake();
          return wire.probes;
        },
        { timeout: 500, interval: 10 },
      )
      .toBe(5);
  });

  it('has the hub’s time again after a sleep in which the machine’s clock stood', async () => {
    const { link, wire } = open(house.lead);
    await until(link, ({ clockErrorMs }) => clockErrorMs !== null);
    wire.slept = 600_000;
    const off = () => Math.abs(link.hubNow() - (performance.timeOrigin + performance.now()));
    expect(off()).toBeGreaterThan(590_000);
    await expect.poll(off, { timeout: 3000 }).toBeLessThan(25);
    const answer = await link.send({ kind: 'dimmer.set', level: 0.5 });
    expect(answer.outcome).toBe('taken');
  });

  it('finds out that a hub has gone silent', async () => {
    // Takes sockets and says nothing: a machine that froze.
    const { WebSocketServer } = await import('ws');
    const frozen = createServer();
    const sockets = new WebSocketServer({ server: frozen });
    const welcome = new Promise<Socket>((resolve) => sockets.on('connection', resolve));
    await new Promise<void>((resolve) => frozen.listen(0, '127.0.0.1', () => resolve()));
    const { port } = frozen.address() as { port: number };
    let asked = 0;
    const link = createShowLink(
      { showId: house.showId, room: 'live', as: 'crew' },
      {
        WebSocket: Socket as unknown as typeof WebSocket,
        fetch: (async () => {
          asked += 1;
          return new Response('{}');
        }) as typeof fetch,
        now: () => performance.now(),
        origin: `http://127.0.0.1:${port}`,
        store: null,
        onWake: () => () => {},
      },
    );
    links.push(link);
    await welcome;
    await expect.poll(() => asked, { timeout: 6000 }).toBeGreaterThan(1);
    link.close();
    sockets.close();
    frozen.close();
  });
});
