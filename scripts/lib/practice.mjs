import { join } from 'node:path';
import { Children } from './children.mjs';
import { bundle, ensureBuilt } from './build.mjs';
import { environment, makeSecrets } from './environment.mjs';
import { checkNode, ensurePackages } from './packages.mjs';
import { choosePorts } from './ports.mjs';
import { Cluster, demoSecrets, ensurePostgres } from './postgres.mjs';
import { step } from './steps.mjs';

/**
 * Brings the whole practice up in one folder: database, stand-ins, demo data, web and worker. `npm start`, `npm run dev`
 * and the browser stories all use it; they differ in folder, ports and in whether Astro's dev server answers.
 * `fresh` empties the folder's data first.
 * @returns what runs, with `stop()` that ends all of it, database too
 */
export async function openPractice({
  folder,
  wanted,
  dev = false,
  fast = false,
  fresh = false,
  env = {},
  onExit,
}) {
  const children = new Children();
  let cluster;
  const stop = async () => {
    await children.stop();
    if (cluster?.started) cluster.stop();
  };
  try {
    await step('Node.js', checkNode);
    await step('Packages', ensurePackages);
    const programs = await step('PostgreSQL', () => ensurePostgres());
    const secrets = demoSecrets(folder, makeSecrets);
    const { ports, moved } = await choosePorts(wanted);
    for (const words of moved) console.log(`  ${words}`);
    cluster = new Cluster({ programs, folder, password: secrets.database, fast });
    if (fresh) cluster.empty(folder);
    await step('Database', async () => {
      cluster.start(ports.database);
      await cluster.ensureDatabases(['newel', 'newel_fakes']);
    });
    if (dev) await step('Bundles', () => bundle(['setup', 'fakes']));
    else await step('Build', () => ensureBuilt(children));
    const { product, fakes } = environment({
      ports,
      secrets,
      databaseUrl: cluster.url('newel'),
      fakesUrl: cluster.url('newel_fakes'),
      folder,
    });
    Object.assign(product, env);
    await step('Stand-ins for payments, mail, files', () =>
      children
        .start('The stand-ins', ['--enable-source-maps', join('dist', 'fakes.mjs')], {
          env: fakes,
          mark: 'fakes ready',
          onExit,
        })
        .then(() => ''),
    );
    await step('Schema and demo practice', async () => {
      const said = await children.run(
        'The set-up',
        ['--enable-source-maps', join('dist', 'setup.mjs')],
        product,
      );
      return said.trim().split('\n').at(-1);
    });
    const web = dev
      ? {
          args: ['node_modules/astro/astro.js', 'dev', '--port', String(ports.site)],
          mark: 'ready in',
          env: { ...product, NODE_ENV: 'development' },
        }
      : { args: ['--enable-source-maps', join('dist', 'main.mjs')], mark: null, env: product };
    await step('Web and worker', () =>
      children
        .start('The site', web.args, {
          env: web.env,
          mark: web.mark,
          onExit,
          quiet: !dev,
          logFile: join(folder, 'site.log'),
        })
        .then(() => ''),
    );
    return { ports, stop, cluster, product };
  } catch (error) {
    await stop();
    throw error;
  }
}
