import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { ensureBuilt } from '../../server/cli/build.mjs';
import { startCluster } from '../../server/cli/cluster.mjs';

/** Builds the pages and brings up a PostgreSQL for the stories: that of DATABASE_URL, or one that forgets. */
export default async function globalSetup(): Promise<() => Promise<void>> {
  ensureBuilt(process.cwd());
  if (process.env.DATABASE_URL) {
    process.env.LAMPYRID_TEST_ADMIN = process.env.DATABASE_URL;
    return async () => undefined;
  }
  const home = mkdtempSync(join(tmpdir(), 'lampyrid-e2e-'));
  chmodSync(home, 0o711);
  const cluster = await startCluster({ home, pgHome: join(home, 'pg'), settings: { fsync: 'off' } });
  process.env.LAMPYRID_TEST_ADMIN = cluster.url;
  return async () => {
    await cluster.stop();
    rmSync(home, { recursive: true, force: true });
  };
}
