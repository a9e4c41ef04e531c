// Holds a cluster as the start command does, and tells its parent about it in one line of JSON.
import { startCluster } from './cli/cluster.mjs';

const cluster = await startCluster({ home: process.argv[2], settings: { fsync: 'off' } });
process.stdout.write(`${JSON.stringify({ ...cluster, pid: cluster.pid() })}\n`);
const ticking = setInterval(() => undefined, 1000);
process.on('SIGTERM', async () => {
  await cluster.stop();
  clearInterval(ticking);
});
