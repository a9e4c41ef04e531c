import pg from 'pg';
import { describe, expect, it } from 'vitest';
import { freshDatabase } from '#tests/make/database';

const names = 'select datname from pg_database';

async function rows(url: string, sql: string): Promise<unknown[]> {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  const { rows } = await client.query(sql);
  await client.end();
  return rows;
}

describe('a fresh database', () => {
  it('is each test’s own', async () => {
    const [one, two] = await Promise.all([freshDatabase(), freshDatabase()]);
    await rows(one.url, 'create table mine (n int)');
    expect(await rows(two.url, "select to_regclass('mine') as mine")).toEqual([{ mine: null }]);
    await Promise.all([one.drop(), two.drop()]);
  });

  it('is gone once dropped, even while somebody is connected', async () => {
    const { url, drop } = await freshDatabase();
    const guest = new pg.Client({ connectionString: url });
    const cut = new Promise((resolve) => guest.on('error', resolve));
    await guest.connect();
    await drop();
    await cut;
    const name = new URL(url).pathname.slice(1);
    const admin = process.env.LAMPYRID_TEST_ADMIN ?? '';
    expect(await rows(admin, names)).not.toContainEqual({ datname: name });
  });
});
