import { join } from 'node:path';
import { makeSecrets } from './environment.mjs';
import { choosePorts } from './ports.mjs';
import { Cluster, demoSecrets, ensurePostgres } from './postgres.mjs';
import { ROOT } from './root.mjs';

export const TEST_FOLDER = join(ROOT, '.newel-test');

/** A cluster for the integration tests: its own folder and port, without durability. */
export async function startTestCluster() {
  const folder = join(TEST_FOLDER, 'integration');
  const secrets = demoSecrets(folder, makeSecrets);
  const { ports } = await choosePorts({ database: 5522 });
  const cluster = new Cluster({ programs: ensurePostgres(), folder, password: secrets.database, fast: true });
  cluster.start(ports.database);
  return { address: cluster.url('').replace(/\/$/, ''), stop: () => cluster.stop() };
}
