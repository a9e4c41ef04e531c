import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { type Cluster, startCluster } from '../../server/cli/cluster.mjs';
import { createDatabase, dropDatabase, withDatabase } from './database';

type Migrate = (databaseUrl: string) => Promise<unknown>;

/**
 * Makes the migrated database that every fresh one is copied from: in the server of DATABASE_URL, or in one of its own
 * in a temporary folder. Tells tests/make/database.ts by the environment, which workers inherit.
 * @returns what takes it all away again
 */
export async function makeTemplate(migrate: Migrate): Promise<() => Promise<void>> {
  const own = process.env.DATABASE_URL ? undefined : await temporaryCluster();
  const admin = process.env.DATABASE_URL ?? own?.cluster.url ?? '';
  const template = `template_${process.pid}_${process.hrtime.bigint().toString(36)}`;
  process.env.LAMPYRID_TEST_ADMIN = admin;
  process.env.LAMPYRID_TEST_TEMPLATE = template;
  const remove = async () => {
    await dropDatabase(admin, template);
    await own?.remove();
  };
  try {
    await createDatabase(admin, template);
    await migrate(withDatabase(admin, template));
  } catch (error) {
    await remove();
    // Its message alone: the whole error repeats every statement several times.
    throw new Error(
      `The tests' database could not be made: ${error instanceof Error ? error.message : error}`,
    );
  }
  return remove;
}

/** A server that forgets: a test's data needn't outlive a power cut, so nothing is synced to the disk. */
async function temporaryCluster(): Promise<{ cluster: Cluster; remove: () => Promise<void> }> {
  const home = mkdtempSync(join(tmpdir(), 'lampyrid-test-'));
  // Root's temporary folders are closed to the account that runs PostgreSQL.
  chmodSync(home, 0o711);
  const settings = { fsync: 'off', full_page_writes: 'off', max_connections: '300' };
  const cluster = await startCluster({ home, pgHome: join(home, 'pg'), settings });
  return {
    cluster,
    remove: async () => {
      await cluster.stop();
      rmSync(home, { recursive: true, force: true });
    },
  };
}
