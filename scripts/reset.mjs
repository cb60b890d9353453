import { rmSync } from 'node:fs';
import { join } from 'node:path';
import { makeSecrets } from './lib/environment.mjs';
import { Cluster, demoSecrets, ensurePostgres, NEWEL_FOLDER } from './lib/postgres.mjs';
import { explain, step } from './lib/steps.mjs';

/** `npm run reset`: empties the demo. The next start fills it anew. */
try {
  await step('Empty the practice', () => {
    const secrets = demoSecrets(NEWEL_FOLDER, makeSecrets);
    const cluster = new Cluster({
      programs: ensurePostgres(),
      folder: NEWEL_FOLDER,
      password: secrets.database,
    });
    cluster.stop();
    rmSync(cluster.data, { recursive: true, force: true });
    rmSync(join(NEWEL_FOLDER, 'objects'), { recursive: true, force: true });
    return 'npm start fills it again';
  });
} catch (error) {
  explain(error);
  process.exit(1);
}
