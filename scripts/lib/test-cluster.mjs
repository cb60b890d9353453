import { existsSync, mkdirSync, readdirSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { makeSecrets } from './environment.mjs';
import { choosePorts } from './ports.mjs';
import { Cluster, demoSecrets, ensurePostgres } from './postgres.mjs';
import { ROOT } from './root.mjs';

export const TEST_FOLDER = join(ROOT, '.newel-test');
const OF_A_RUN = /^integration-(\d+)$/;

function lives(pid) {
  try {
    return process.kill(pid, 0);
  } catch (error) {
    return error.code === 'EPERM';
  }
}

function discard(cluster, folder) {
  cluster.empty(folder);
  for (const path of [folder, join(cluster.data, '..')]) rmSync(path, { recursive: true, force: true });
}

/** Ends what killed runs have left behind. */
function sweep(programs) {
  if (!existsSync(TEST_FOLDER)) return;
  for (const name of readdirSync(TEST_FOLDER)) {
    const pid = Number(OF_A_RUN.exec(name)?.[1]);
    if (!pid || lives(pid)) continue;
    const folder = join(TEST_FOLDER, name);
    discard(new Cluster({ programs, folder, password: '', fast: true }), folder);
  }
}

/** A cluster for one run of the integration tests, without durability; runs beside each other do not meet. */
export async function startTestCluster() {
  const programs = ensurePostgres();
  sweep(programs);
  const folder = join(TEST_FOLDER, `integration-${process.pid}`);
  mkdirSync(folder, { recursive: true });
  const secrets = demoSecrets(folder, makeSecrets);
  // Each run looks from a place of its own, so that two that start together do not take the same port.
  const { ports } = await choosePorts({ database: 5522 + (process.pid % 400) });
  const cluster = new Cluster({ programs, folder, password: secrets.database, fast: true });
  cluster.start(ports.database);
  return { address: cluster.url('').replace(/\/$/, ''), stop: () => discard(cluster, folder) };
}
