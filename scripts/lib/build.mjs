import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { readdir, readFile, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { brotliCompress, constants, gzip } from 'node:zlib';
import { cleanEnvironment } from './packages.mjs';
import { ROOT } from './root.mjs';

const DIST = join(ROOT, 'dist');
const STAMP = join(DIST, 'stamp');
const SOURCES = [
  'src',
  'content',
  'public',
  'fakes',
  'drizzle',
  'astro.config.mjs',
  'package.json',
  'package-lock.json',
  'tsconfig.json',
  'scripts/lib/build.mjs',
];
const BUNDLES = {
  main: 'src/server/main.ts',
  worker: 'src/server/worker-main.ts',
  setup: 'src/server/setup.ts',
  fakes: 'fakes/main.ts',
};
const TEXT = /\.(html|css|js|json|svg|xml|txt|webmanifest)$/;

function* filesUnder(path) {
  if (!existsSync(path)) return;
  if (!statSync(path).isDirectory()) return void (yield path);
  for (const name of readdirSync(path).sort()) yield* filesUnder(join(path, name));
}

/** A hash of everything the build is made from. */
function sourceHash() {
  const hash = createHash('sha256');
  for (const source of SOURCES) {
    for (const file of filesUnder(join(ROOT, source))) {
      if (/\.test\.tsx?$/.test(file)) continue;
      hash.update(file.slice(ROOT.length)).update(readFileSync(file));
    }
  }
  return hash.digest('hex');
}

export const isBuilt = () => existsSync(STAMP) && readFileSync(STAMP, 'utf8') === sourceHash();

/** Bundles our server processes; packages stay outside, in node_modules. */
export async function bundle(names = Object.keys(BUNDLES)) {
  const { build } = await import('esbuild');
  await build({
    entryPoints: names.map((name) => ({ in: join(ROOT, BUNDLES[name]), out: name })),
    outdir: DIST,
    outExtension: { '.js': '.mjs' },
    bundle: true,
    platform: 'node',
    target: 'node20',
    format: 'esm',
    sourcemap: 'linked',
    logLevel: 'warning',
    external: ['./server/entry.mjs'],
    plugins: [
      {
        // Package names stay outside; our own `#…` imports are followed.
        name: 'packages-outside',
        setup({ onResolve }) {
          onResolve({ filter: /^[^./#]/ }, ({ path, kind }) =>
            kind === 'entry-point' ? undefined : { path, external: true },
          );
        },
      },
    ],
  });
}

/** Puts a brotli and a gzip copy beside each text file of the client. */
async function precompress(folder) {
  const brotli = promisify(brotliCompress);
  const zip = promisify(gzip);
  const entries = await readdir(folder, { recursive: true, withFileTypes: true });
  await Promise.all(
    entries
      .filter((entry) => entry.isFile() && TEXT.test(entry.name))
      .map(async (entry) => {
        const path = join(entry.parentPath, entry.name);
        const body = await readFile(path);
        if (body.length < 256) return;
        const [br, gz] = await Promise.all([
          brotli(body, {
            params: { [constants.BROTLI_PARAM_QUALITY]: 11, [constants.BROTLI_PARAM_SIZE_HINT]: body.length },
          }),
          zip(body, { level: 9 }),
        ]);
        await Promise.all([writeFile(`${path}.br`, br), writeFile(`${path}.gz`, gz)]);
      }),
  );
}

const sha256 = (text) => `'sha256-${createHash('sha256').update(text).digest('base64')}'`;

/** The hashes of every inline script and style that the build can send, for the one CSP header. */
async function writeCspHashes() {
  const scripts = new Set();
  const styles = new Set();
  const astro = join(ROOT, 'node_modules/astro/dist/runtime');
  const names = [
    'server/astro-island.prebuilt.js',
    ...['load', 'idle', 'visible', 'media', 'only'].map((name) => `client/${name}.prebuilt.js`),
  ];
  for (const name of names) scripts.add(sha256((await import(join(astro, name))).default));
  styles.add(sha256('astro-island,astro-slot,astro-static-slot{display:contents}'));
  for (const file of filesUnder(join(DIST, 'client'))) {
    if (!file.endsWith('.html')) continue;
    const html = readFileSync(file, 'utf8');
    for (const [, attributes, text] of html.matchAll(/<script([^>]*)>([\s\S]*?)<\/script>/g)) {
      if (!/\bsrc=|type="application\/(ld\+)?json"/.test(attributes) && text) scripts.add(sha256(text));
    }
    for (const [, text] of html.matchAll(/<style[^>]*>([\s\S]*?)<\/style>/g)) styles.add(sha256(text));
  }
  writeFileSync(
    join(DIST, 'csp.json'),
    JSON.stringify({ scripts: [...scripts], styles: [...styles] }, null, 2),
  );
}

/** Builds everything a start needs, unless nothing changed since the last build. */
export async function ensureBuilt(children) {
  if (isBuilt()) return 'unchanged';
  const hash = sourceHash();
  await children.run('The build', ['node_modules/astro/astro.js', 'build'], {
    ...cleanEnvironment(),
    ASTRO_TELEMETRY_DISABLED: '1',
    NODE_ENV: 'production',
  });
  await bundle();
  await Promise.all([precompress(join(DIST, 'client')), writeCspHashes()]);
  writeFileSync(STAMP, hash);
  return 'built';
}
