import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ROOT } from './root.mjs';
import { StepError } from './steps.mjs';

const MARKER = join(ROOT, 'node_modules', '.newel-lock');
const WANTED = [20, 19];

/** @throws StepError when Node.js is too old */
export function checkNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major < WANTED[0] || (major === WANTED[0] && minor < WANTED[1])) {
    throw new StepError(
      `Node.js ${process.versions.node} is too old; ${WANTED.join('.')} or newer is needed.`,
      'Install Node.js 20.19 or newer (22 works too) and start again.',
    );
  }
  return process.versions.node;
}

const lockHash = () =>
  createHash('sha256')
    .update(readFileSync(join(ROOT, 'package-lock.json')))
    .digest('hex');

/** The environment for a nested npm or tool: without what the outer npm put there. */
export function cleanEnvironment(extra = {}) {
  const kept = Object.entries(process.env).filter(
    ([name]) => !/^npm_(?!config_(registry|cache|nodedir|proxy|https_proxy|cafile))|^NODE_ENV$/i.test(name),
  );
  return { ...Object.fromEntries(kept), ...extra };
}

/** Installs from the lock file when node_modules is missing or made from another lock file. */
export async function ensurePackages() {
  const hash = lockHash();
  if (existsSync(MARKER) && readFileSync(MARKER, 'utf8') === hash) return 'as locked';
  await new Promise((done, fail) => {
    const npm = spawn(
      'npm',
      ['ci', '--include=dev', '--ignore-scripts', '--no-audit', '--no-fund', '--loglevel=error'],
      {
        cwd: ROOT,
        stdio: ['ignore', 'ignore', 'inherit'],
        env: cleanEnvironment({ PLAYWRIGHT_SKIP_BROWSER_DOWNLOAD: '1' }),
      },
    );
    npm.on('error', () =>
      fail(new StepError('npm was not found.', 'Install npm, which comes with Node.js.')),
    );
    npm.on('exit', (code) =>
      code === 0
        ? done()
        : fail(
            new StepError(
              'npm could not install the packages.',
              'Read its lines above; most often the network or the registry does not answer. Then start again.',
            ),
          ),
    );
  });
  writeFileSync(MARKER, hash);
  return 'installed';
}
