import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { CommandBody } from '#shared/show/commands';
import { makeHubHouse } from '#tests/make/hub';
import { houseWithStore } from '#tests/make/hubStore';

const fire = (sceneId: string): CommandBody => ({
  kind: 'scene.trigger',
  screenIds: ['back'],
  sceneId,
  landsOn: 'now',
});

describe('a hub that is killed', () => {
  it.each([
    ['without a word', true],
    ['in order', false],
  ])('%s comes back with every event that was kept, in a new epoch', async (_how, kill) => {
    const house = await makeHubHouse();
    const phone = await house.open(house.lead);
    const first = await phone.join();
    phone.command('a', fire(house.sceneId));
    phone.command('b', { kind: 'dimmer.set', level: 0.25 });
    phone.command('c', { kind: 'blackout.set', on: true });
    await phone.next('kept', (one) => one.commandId === 'c');
    await house.restart(kill);
    const again = await house.open(house.lead);
    const { state } = await again.join();
    expect(state.epoch).toBe(first.state.epoch + 1);
    expect(state).toMatchObject({ dimmer: 0.25, blackout: { on: true } });
    expect(state.screens.back?.next?.sceneId).toBe(house.sceneId);
    // A command that was sent again over the restart is still applied once.
    again.command('b', { kind: 'dimmer.set', level: 0.9 });
    expect(await again.answer('b')).toMatchObject({ type: 'taken', revision: null });
    again.command('d', { kind: 'calm.set', on: true });
    expect(await again.answer('d')).toMatchObject({ type: 'taken', revision: 1 });
    await house.close();
  });

  it('keeps what is on the wall from the log of what was drawn', async () => {
    const house = await makeHubHouse();
    const display = await house.open();
    await display.join();
    const row = { displayId: house.displayId, screenId: 'back', sceneId: null, sceneVersion: null };
    const reports = ['one', 'two'].map((runId, seq) => ({ ...row, runId, at: 1e12 + seq, lateMs: 0, seq }));
    display.put({ type: 'drawn', drawn: reports });
    await display.next('logged');
    await house.restart(true);
    const phone = await house.open(house.lead);
    const { wall } = await phone.join();
    expect(wall).toEqual([{ displayId: house.displayId, screenId: 'back', runId: 'two', at: 1e12 + 1 }]);
    await house.close();
  });
});

describe('while the database is away', () => {
  it('events go to a file, are said to be kept, and are in the database once it is back', async () => {
    let away = false;
    const { house } = await houseWithStore((real) => ({
      append: (rows) => (away ? Promise.reject(new Error('ECONNREFUSED')) : real().append(rows)),
    }));
    const phone = await house.open(house.lead);
    await phone.join();
    away = true;
    phone.command('a', { kind: 'dimmer.set', level: 0.4 });
    expect((await phone.next('kept', (one) => one.commandId === 'a')).kept).toBe(true);
    expect((await phone.next('durable')).durable).toBe('spill');
    const folder = join(house.dataDir, 'spill');
    const [name = ''] = readdirSync(folder);
    expect(JSON.parse(readFileSync(join(folder, name), 'utf8'))).toMatchObject({ commandId: 'a' });
    away = false;
    await phone.next('durable', (one) => one.durable === 'database');
    expect(existsSync(join(folder, name))).toBe(false);
    expect(await house.db.showEvents.count({ where: { commandId: 'a' } })).toBe(1);
    await house.close();
  });

  it('a connection that PostgreSQL has cut is made anew, and nothing is lost', async () => {
    const house = await makeHubHouse();
    const phone = await house.open(house.lead);
    await phone.join();
    phone.command('a', { kind: 'dimmer.set', level: 0.4 });
    await phone.next('kept', (one) => one.commandId === 'a');
    await house.db.pool.query(
      "select pg_terminate_backend(pid) from pg_stat_activity where application_name = 'lampyrid journal' and datname = current_database()",
    );
    phone.command('b', { kind: 'dimmer.set', level: 0.5 });
    expect((await phone.next('kept', (one) => one.commandId === 'b')).kept).toBe(true);
    await expect
      .poll(() => house.db.showEvents.count({ where: { commandId: 'b' } }), { timeout: 5000 })
      .toBe(1);
    await house.close();
  });

  it('a hub that dies with events in its file brings them into the database when it starts', async () => {
    let away = true;
    const { house, real } = await houseWithStore((store) => ({
      append: (rows) => (away ? Promise.reject(new Error('ECONNREFUSED')) : store().append(rows)),
      close: async () => undefined,
    }));
    const phone = await house.open(house.lead);
    await phone.join();
    phone.command('a', { kind: 'dimmer.set', level: 0.125 });
    await phone.next('kept', (one) => one.commandId === 'a');
    away = false;
    await house.restart(true);
    const again = await house.open(house.lead);
    expect((await again.join()).state.dimmer).toBe(0.125);
    await real().close();
    await house.close();
  });
});
