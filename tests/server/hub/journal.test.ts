import { mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { makeJournal } from '#server/hub/journal';
import { connect } from '#server/models/database';
import { type EventRow, makeHubStore } from '#server/services/hubStore';
import { makeLog } from '#server/services/log';
import { makeCrew, makeShow } from '#tests/make/crew';
import { freshDatabase } from '#tests/make/database';

let folder = '';
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'lampyrid-journal-'));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

const row = (commandId: string, showId = 'night'): EventRow => ({
  showId,
  room: 'live',
  epoch: 1,
  revision: Number(commandId.replace(/\D/g, '')),
  at: 1e12,
  commandId,
  by: null,
  body: { kind: 'dimmer.changed', level: 0.5 },
});
const fault = (code: string) => Object.assign(new Error('no'), { code });
const log = makeLog('silent');

/** A journal on a stand-in for the database whose answer the test decides. */
const make = (answer: (rows: readonly EventRow[]) => Promise<void>) => {
  const written: string[] = [];
  const told: string[] = [];
  const append = async (rows: readonly EventRow[]) => {
    await answer(rows);
    written.push(...rows.map(({ commandId }) => commandId ?? ''));
  };
  return { written, told, journal: makeJournal({ append }, folder, log, (durable) => told.push(durable)) };
};

describe('an event that the database will never take', () => {
  // 23503 is foreign_key_violation: PostgreSQL 15 documentation, appendix A.
  it('is said not to be kept, and those beside it are kept in the database', async () => {
    const { journal, written, told } = make(async (rows) => {
      if (rows.some(({ commandId }) => commandId === 'c3')) throw fault('23503');
    });
    const kept = await Promise.all(['c1', 'c2', 'c3', 'c4', 'c5'].map((id) => journal.append(row(id))));
    expect(kept).toEqual([true, true, false, true, true]);
    expect(written.sort()).toEqual(['c1', 'c2', 'c4', 'c5']);
    expect(told).toEqual([]);
    await journal.close();
  });

  it('in a spill file does not hold up the files of other shows', async () => {
    writeFileSync(join(folder, 'a.live.jsonl'), `${JSON.stringify(row('c3', 'a'))}\n`);
    writeFileSync(join(folder, 'b.live.jsonl'), `${JSON.stringify(row('c4', 'b'))}\n`);
    const { journal, written } = make(async (rows) => {
      if (rows.some(({ commandId }) => commandId === 'c3')) throw fault('23503');
    });
    expect(await journal.replay()).toBe(true);
    expect(written).toEqual(['c4']);
    expect(readdirSync(folder)).toEqual([]);
    await journal.close();
  });

  it('because its show was deleted leaves the others of its batch alone, in real PostgreSQL', async () => {
    const fresh = await freshDatabase();
    const db = connect(fresh.url);
    const { crewId } = await makeCrew(db);
    const showId = await makeShow(db, crewId, []);
    const store = makeHubStore(db, fresh.url);
    await store.append([row('c1', 'deleted'), row('c2', showId)]);
    expect((await db.showEvents.findAll()).map(({ commandId }) => commandId)).toEqual(['c2']);
    await store.close();
    await db.close();
    await fresh.drop();
  });
});

describe('a database that hangs', () => {
  it('does not hold up what goes to the spill file meanwhile', async () => {
    let asked = 0;
    let hang = () => {};
    const hung = new Promise<void>((resolve) => {
      hang = resolve;
    });
    const { journal, told } = make(() => {
      asked += 1;
      if (asked === 1) return Promise.reject(fault('ECONNREFUSED'));
      hang();
      return new Promise(() => undefined);
    });
    expect(await journal.append(row('c1'))).toBe(true);
    // By now it is asked whether it is back, and will never answer.
    await hung;
    expect(await journal.append(row('c2'))).toBe(true);
    expect(told).toEqual(['spill']);
  });
});

describe('a spill file', () => {
  it('with a line that was broken off keeps all that was written after it', async () => {
    let away = true;
    const { journal, written } = make(() =>
      away ? Promise.reject(fault('ECONNREFUSED')) : Promise.resolve(),
    );
    writeFileSync(join(folder, 'night.live.jsonl'), JSON.stringify(row('c1')).slice(0, 40));
    expect(await journal.append(row('c2'))).toBe(true);
    away = false;
    expect(await journal.replay()).toBe(true);
    expect(written).toEqual(['c2']);
    await journal.close();
  });

  it('that cannot be written is no promise: the event is said not to be kept', async () => {
    // A folder stands where the file would be.
    mkdirSync(join(folder, 'night.live.jsonl'));
    const { journal, told } = make(() => Promise.reject(fault('ECONNREFUSED')));
    expect(await journal.append(row('c1'))).toBe(false);
    expect(told).toEqual(['none']);
    await journal.close();
  });
});
