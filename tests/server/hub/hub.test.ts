import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { hubLimits } from '#server/hub/limits';
import { closeCodes, protocolVersion } from '#shared/protocol/constants';
import type { Drawn } from '#shared/protocol/messages';
import type { CommandBody } from '#shared/show/commands';
import { leadLimits } from '#shared/show/landing';
import { type HubHouse, makeHubHouse } from '#tests/make/hub';
import { makeVitals } from '#tests/make/night';

let house: HubHouse;
beforeAll(async () => {
  house = await makeHubHouse();
});
afterEach(() => house.hangUp());
afterAll(() => house.close());

let made = 0;
const id = () => {
  made += 1;
  return `c-${made}`;
};
const fire = (screenIds = ['back']): CommandBody => ({
  kind: 'scene.trigger',
  screenIds,
  sceneId: house.sceneId,
  landsOn: 'now',
});
const vitals = (displayId: string, changes = 0) => makeVitals(displayId, { changes });
const drawn = (displayId: string, seq: number, runId: string, at = 1e12): Drawn => ({
  displayId,
  screenId: 'back',
  runId,
  sceneId: house.sceneId,
  sceneVersion: 1,
  at,
  lateMs: 2,
  seq,
});

describe('the door', () => {
  const path = () => `/hub?show=${house.showId}&room=live&as=crew`;
  it('lets nobody in from a foreign page, without a sign-in, or to another crew’s show', async () => {
    const good = { origin: 'http://here', cookie: `user=${house.lead.userId}` };
    expect(await house.refused(path(), { ...good, origin: 'http://evil.example' })).toBe(403);
    expect(await house.refused(path(), { cookie: good.cookie })).toBe(403);
    expect(await house.refused(path(), { ...good, cookie: 'user=stranger' })).toBe(401);
    expect(await house.refused('/hub?show=other&room=live&as=crew', good)).toBe(404);
    expect(await house.refused('/hub?show=other', good)).toBe(404);
    expect(await house.refused('/elsewhere', good)).toBe(404);
    expect(await house.refused(path(), good)).toBe(101);
  });

  it('keeps displays out of rehearsals and of other shows', async () => {
    const device = { origin: 'http://here', cookie: 'device=1' };
    expect(await house.refused(`/hub?show=${house.showId}&room=rehearsal&as=display`, device)).toBe(403);
    expect(await house.refused('/hub?show=other&room=live&as=display', device)).toBe(403);
  });

  it('tells an older page that it is outdated', async () => {
    const socket = await house.open(house.lead);
    socket.put({ type: 'hello', protocol: protocolVersion - 1, epoch: null, revision: null });
    expect(await socket.closed()).toBe(closeCodes.versionMismatch);
  });
});

describe('a trigger', () => {
  it('reaches everybody with the moment it lands, and is kept in PostgreSQL', async () => {
    const [phone, display] = [await house.open(house.lead), await house.open()];
    await phone.join();
    await display.join();
    const trigger = id();
    const before = performance.timeOrigin + performance.now();
    phone.command(trigger, fire());
    const answer = await phone.answer(trigger);
    const { event } = await display.next('event', (one) => one.event.commandId === trigger);
    if (event.body.kind !== 'scene.fired' || answer.type !== 'taken') throw new Error('Not fired.');
    expect(event.body.run.landsAt).toBe(answer.landsAt);
    expect(event.body.run.landsAt - before).toBeGreaterThanOrEqual(leadLimits.floor);
    expect((await phone.next('kept', (one) => one.commandId === trigger)).kept).toBe(true);
    const rows = await house.db.showEvents.findAll({ where: { commandId: trigger } });
    expect(rows.map(({ by, body }) => [by, body.kind])).toEqual([[house.lead.userId, 'scene.fired']]);
  });

  it('with the same id twice is applied once', async () => {
    const phone = await house.open(house.lead);
    const { state } = await phone.join();
    const trigger = id();
    phone.command(trigger, fire());
    phone.command(trigger, fire());
    const other = id();
    phone.command(other, { kind: 'dimmer.set', level: 0.7 });
    const answer = await phone.answer(other);
    expect(answer).toMatchObject({ type: 'taken', revision: state.revision + 2 });
    const twice = phone.heard.filter((one) => one.type === 'taken' && one.commandId === trigger);
    expect(twice.map((one) => one.type === 'taken' && one.revision)).toEqual([state.revision + 1, null]);
  });

  it.each([
    ['expired', () => fire(), -1],
    ['unknown-scene', () => ({ ...fire(), sceneId: 'nowhere' }) as CommandBody, 2000],
    ['unknown-screen', () => fire(['moon']), 2000],
  ])('that is %s is refused in five words or fewer', async (code, body, lifeMs) => {
    const phone = await house.open(house.lead);
    await phone.join();
    const trigger = id();
    phone.command(trigger, body(), lifeMs);
    const answer = await phone.answer(trigger);
    expect(answer).toMatchObject({ type: 'refused', code });
    if (answer.type === 'refused') expect(answer.words.split(' ').length).toBeLessThanOrEqual(5);
  });

  it('of a role that may not is refused, and so is one of a display', async () => {
    const phone = await house.open(await house.member('assistant'));
    await phone.join();
    phone.command('not-mine', fire());
    expect(await phone.answer('not-mine')).toMatchObject({ type: 'refused', code: 'not-allowed' });
    const display = await house.open();
    await display.join();
    display.command('not-a-phone', { kind: 'blackout.set', on: true });
    expect(await display.answer('not-a-phone')).toMatchObject({ type: 'refused', code: 'not-allowed' });
  });

  it('too many at once are refused, and the rest of the room goes on', async () => {
    const phone = await house.open(house.lead);
    await phone.join();
    const many = hubLimits.commandsPerSecond * 3;
    const ids = Array.from({ length: many }, id);
    for (const one of ids) phone.command(one, { kind: 'dimmer.set', level: 1 });
    const answers = await Promise.all(ids.map((one) => phone.answer(one)));
    const refused = answers.filter((answer) => answer.type === 'refused' && answer.code === 'too-many');
    expect(refused.length).toBeGreaterThan(hubLimits.commandsPerSecond / 2);
    expect(answers[0]?.type).toBe('taken');
  });
});

describe('what is encoded', () => {
  it('is one frame for all receivers', async () => {
    const sockets = await Promise.all([1, 2, 3, 4, 5, 6].map(() => house.open(house.lead)));
    for (const socket of sockets) await socket.join();
    const trigger = id();
    const before = house.encodes();
    sockets[0]?.command(trigger, { kind: 'dimmer.set', level: 0.5 });
    await Promise.all(
      sockets.map((socket) => socket.next('event', (one) => one.event.commandId === trigger)),
    );
    // A heartbeat or a list of displays may fall between; six frames for one event would not.
    expect(house.encodes() - before).toBeLessThanOrEqual(3);
  });
});

describe('a page that was away', () => {
  it('gets what it missed and no more', async () => {
    const [phone, other] = [await house.open(house.lead), await house.open(house.lead)];
    const { state } = await other.join();
    await phone.join();
    other.socket.terminate();
    const ids = [id(), id()];
    for (const one of ids) phone.command(one, { kind: 'dimmer.set', level: 0.3 });
    await phone.answer(ids[1] ?? '');
    const again = await house.open(house.lead);
    again.put({ type: 'hello', protocol: protocolVersion, epoch: state.epoch, revision: state.revision });
    const { events } = await again.next('resume');
    expect(events.map(({ commandId }) => commandId)).toEqual(ids);
  });

  it('gets the whole when it knows another epoch', async () => {
    const phone = await house.open(house.lead);
    phone.put({ type: 'hello', protocol: protocolVersion, epoch: 0, revision: 3 });
    expect((await phone.next('welcome')).state.showId).toBe(house.showId);
  });
});

describe('displays', () => {
  it('are seen by the crew with vitals, and as gone when they leave', async () => {
    const [phone, display] = [await house.open(house.lead), await house.open()];
    await phone.join();
    await display.join();
    display.put({ type: 'vitals', vitals: vitals(house.displayId, 4) });
    const { displays } = await phone.next('displays', (one) =>
      one.displays.some(({ vitals: v }) => v?.changes === 4),
    );
    expect(displays[0]).toMatchObject({ displayId: house.displayId, connected: true, simulated: false });
    display.socket.close();
    await phone.next('displays', (one) => one.displays.every(({ connected }) => !connected));
  });

  it('say what is on the wall, once in the log however often they say it', async () => {
    const [phone, display] = [await house.open(house.lead), await house.open()];
    await phone.join();
    await display.join();
    const report = { type: 'drawn' as const, drawn: [drawn(house.displayId, 7, 'run-7')] };
    display.put(report);
    expect((await display.next('logged')).seq).toBe(7);
    display.put(report);
    await phone.next('wall', (one) => one.wall.some(({ runId }) => runId === 'run-7'));
    await display.next('logged', (one) => display.heard.indexOf(one) > 0);
    expect(await house.db.asRun.count({ where: { runId: 'run-7' } })).toBe(1);
  });

  it('cannot speak for one another', async () => {
    const [phone, display] = [await house.open(house.lead), await house.open()];
    await phone.join();
    await display.join();
    display.put({ type: 'drawn', drawn: [drawn('another', 1, 'forged')] });
    phone.put({ type: 'drawn', drawn: [drawn(house.displayId, 1, 'forged')] });
    display.put({ type: 'drawn', drawn: [drawn(house.displayId, 8, 'true')] });
    await display.next('logged', (one) => one.seq === 8);
    expect(await house.db.asRun.count({ where: { runId: 'forged' } })).toBe(0);
  });

  it('get a map while it is dragged, and nobody stores it', async () => {
    const [phone, display] = [await house.open(house.lead), await house.open()];
    await phone.join();
    await display.join();
    const map = { raster: [1280, 720] as [number, number], regions: [] };
    const drag = id();
    phone.command(drag, { kind: 'map.draft', displayId: house.displayId, map });
    expect((await display.next('draft')).map).toEqual(map);
    expect(await phone.answer(drag)).toMatchObject({ type: 'taken', revision: null });
    expect(await house.db.showEvents.count({ where: { commandId: drag } })).toBe(0);
  });
});

describe('a rehearsal', () => {
  it('never reaches a real display, and leaves no trace in the record', async () => {
    const [display, wall] = [await house.open(), await house.open(house.lead)];
    await display.join();
    await wall.join();
    const rehearsal = await house.open(house.lead, 'rehearsal');
    await rehearsal.join();
    const trigger = id();
    rehearsal.command(trigger, fire());
    await rehearsal.next('kept', (one) => one.commandId === trigger);
    rehearsal.put({ type: 'vitals', vitals: vitals('sim-back') });
    rehearsal.put({ type: 'drawn', drawn: [drawn('sim-back', 1, 'rehearsed')] });
    await rehearsal.next('logged');
    await rehearsal.next('displays', (one) => one.displays.some(({ simulated }) => simulated));
    // A live command after it has reached both, so anything from the rehearsal would have come before.
    const live = id();
    wall.command(live, { kind: 'dimmer.set', level: 0.9 });
    await display.next('event', (one) => one.event.commandId === live);
    expect(display.heard.some((one) => one.type === 'event' && one.event.commandId === trigger)).toBe(false);
    expect(await house.db.asRun.count({ where: { runId: 'rehearsed' } })).toBe(0);
  });
});

describe('a socket that talks nonsense', () => {
  it('is answered where that is possible, then closed; others do not notice', async () => {
    const [bad, good] = [await house.open(house.lead), await house.open(house.lead)];
    await bad.join();
    await good.join();
    bad.put('{"type":"command","command":{"id":"half","body":{"kind":"no such thing"}}}');
    expect(await bad.answer('half')).toMatchObject({ type: 'refused', code: 'bad-command' });
    for (let one = 0; one <= hubLimits.junk; one += 1) bad.put('not json {');
    expect(await bad.closed()).toBe(closeCodes.badMessage);
    const broken = await house.open(house.lead);
    await broken.join();
    // Bytes that are no WebSocket frame at all, straight into the wire.
    (broken.socket as unknown as { _socket: { write: (bytes: Buffer) => void } })._socket.write(
      Buffer.from([0xff, 0xff, 0xff, 0xff]),
    );
    await broken.closed();
    const alive = id();
    good.command(alive, { kind: 'dimmer.set', level: 1 });
    expect((await good.answer(alive)).type).toBe('taken');
  });

  it('is cut when it sends more than 64 KiB at once', async () => {
    const socket = await house.open(house.lead);
    await socket.join();
    socket.put('x'.repeat(hubLimits.payload + 1));
    expect(await socket.closed()).toBe(1009);
  });
});

describe('whoever lost the right', () => {
  it('is out at once', async () => {
    const member = await house.member('vj');
    const phone = await house.open(member);
    await phone.join();
    house.hub.revoke({ userId: member.userId });
    expect(await phone.closed()).toBe(closeCodes.notAllowed);
    const display = await house.open();
    await display.join();
    house.hub.revoke({ displayId: house.displayId });
    expect(await display.closed()).toBe(closeCodes.notAllowed);
  });
});
