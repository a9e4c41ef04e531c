import { afterEach, describe, expect, it } from 'vitest';
import { showManifest } from '#server/services/manifest';
import { closeCodes } from '#shared/protocol/constants';
import { type HubHouse, makeHubHouse } from '#tests/make/hub';
import { houseWithStore } from '#tests/make/hubStore';
import { makeVitals } from '#tests/make/night';

let house: HubHouse | null = null;
afterEach(async () => {
  await house?.close();
  house = null;
});

/** A house whose store does some things differently; closed after the test. */
const houseWith = async (change: Parameters<typeof houseWithStore>[0]): Promise<HubHouse> => {
  const made = (await houseWithStore(change)).house;
  house = made;
  return made;
};

const vitals = makeVitals('sim-back');

describe('a room', () => {
  it('that is still being opened holds up no other room’s heartbeat', async () => {
    const here = await houseWith((real) => ({
      open: (showId, room, now) =>
        room === 'rehearsal' ? new Promise(() => undefined) : real().open(showId, room, now),
    }));
    const phone = await here.open(here.lead);
    await phone.join();
    here.open(here.lead, 'rehearsal').catch(() => undefined);
    await phone.next('beat');
    const heard = phone.heard.length;
    await phone.next('beat', (one) => phone.heard.indexOf(one) >= heard);
  });

  it('says that the two-hundredth event is kept although its snapshot does not get through', async () => {
    let letGo = () => {};
    const gate = new Promise<void>((resolve) => {
      letGo = resolve;
    });
    const here = await houseWith(() => ({ snapshot: () => gate }));
    const phone = await here.open(here.lead);
    await phone.join();
    const map = { raster: [1280, 720] as [number, number], regions: [] };
    for (let version = 1; version < 200; version += 1)
      here.hub.mapSaved(here.showId, here.displayId, version, map, null);
    await phone.next('event', ({ event }) => event.body.kind === 'map.saved' && event.body.version === 199);
    phone.command('after', { kind: 'dimmer.set', level: 0.5 });
    expect((await phone.next('kept', (one) => one.commandId === 'after')).kept).toBe(true);
    letGo();
  });

  it('tells a page that asks again over another socket when its command is kept', async () => {
    let letGo = () => {};
    const gate = new Promise<void>((resolve) => {
      letGo = resolve;
    });
    const here = await houseWith((real) => ({ append: (rows) => gate.then(() => real().append(rows)) }));
    const before = await here.open(here.lead);
    await before.join();
    before.command('once', { kind: 'dimmer.set', level: 0.5 });
    await before.answer('once');
    before.socket.terminate();
    const after = await here.open(here.lead);
    await after.join();
    after.command('once', { kind: 'dimmer.set', level: 0.5 });
    expect(await after.answer('once')).toMatchObject({ type: 'taken', revision: null });
    letGo();
    expect((await after.next('kept')).kept).toBe(true);
    expect(await here.db.showEvents.count({ where: { commandId: 'once' } })).toBe(1);
  });

  it('of a show that was deleted sends everybody away', async () => {
    house = await makeHubHouse();
    const phone = await house.open(house.lead);
    await phone.join();
    await house.db.shows.destroy({ where: { id: house.showId } });
    house.hub.manifestChanged(house.showId);
    expect(await phone.closed()).toBe(closeCodes.gone);
  });

  it('forgets a simulated display when the page that drew it goes, though others of the crew stay', async () => {
    house = await makeHubHouse();
    const [one, other] = [
      await house.open(house.lead, 'rehearsal'),
      await house.open(house.lead, 'rehearsal'),
    ];
    await one.join();
    await other.join();
    one.put({ type: 'vitals', vitals });
    await other.next('displays', ({ displays }) =>
      displays.some(({ displayId }) => displayId === 'sim-back'),
    );
    const heard = other.heard.length;
    one.socket.close();
    const { displays } = await other.next('displays', (told) => other.heard.indexOf(told) >= heard);
    expect(displays).toEqual([]);
  });

  it('takes blackout and calm after the night is closed, and fires nothing', async () => {
    house = await makeHubHouse();
    await house.db.shows.update({ mode: 'closed' }, { where: { id: house.showId } });
    const phone = await house.open(house.lead);
    await phone.join();
    phone.command('dark', { kind: 'blackout.set', on: true });
    phone.command('calm', { kind: 'calm.set', on: true });
    phone.command('dim', { kind: 'dimmer.set', level: 0.5 });
    expect((await phone.answer('dark')).type).toBe('taken');
    expect((await phone.answer('calm')).type).toBe('taken');
    expect(await phone.answer('dim')).toMatchObject({ type: 'refused', code: 'show-closed' });
  });
});

describe('a right that is taken away while a socket opens', () => {
  it('keeps that socket out until it asks once more', async () => {
    let meanwhile = () => {};
    const here = await makeHubHouse({
      loadShow: async (id) => {
        meanwhile();
        return house && showManifest(house.db, id);
      },
    });
    house = here;
    const headers = { origin: 'http://here', cookie: `user=${here.lead.userId}` };
    const path = `/hub?show=${here.showId}&room=live&as=crew`;
    meanwhile = () => here.hub.revoke({ userId: here.lead.userId });
    expect(await here.refused(path, headers)).toBe(503);
    meanwhile = () => undefined;
    expect(await here.refused(path, headers)).toBe(101);
  });
});

describe('a hub that stops', () => {
  it('says what is kept before it says goodbye', async () => {
    let letGo = () => {};
    const gate = new Promise<void>((resolve) => {
      letGo = resolve;
    });
    const here = await houseWith((real) => ({ append: (rows) => gate.then(() => real().append(rows)) }));
    const phone = await here.open(here.lead);
    await phone.join();
    phone.command('last', { kind: 'dimmer.set', level: 0.5 });
    await phone.answer('last');
    const closing = here.hub.close();
    letGo();
    expect(await phone.closed()).toBe(closeCodes.shuttingDown);
    expect(phone.heard.some((one) => one.type === 'kept' && one.commandId === 'last' && one.kept)).toBe(true);
    await closing;
  });
});
