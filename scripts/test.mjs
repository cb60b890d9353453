import { existsSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { runChecks } from './lib/checks.mjs';
import { Children } from './lib/children.mjs';
import { ensurePackages, checkNode } from './lib/packages.mjs';
import { installDebian } from './lib/postgres.mjs';
import { openPractice } from './lib/practice.mjs';
import { ROOT } from './lib/root.mjs';
import { explain, step } from './lib/steps.mjs';
import { startTestCluster, TEST_FOLDER } from './lib/test-cluster.mjs';

/** `npm test`: everything, or `npm test -- check|unit|integration|e2e [filter]` for one part. */
const PORTS = { site: 5321, database: 5322, payments: 5323, inbox: 5324, smtp: 5325, objects: 5327 };
const [part = 'all', ...filter] = process.argv.slice(2);
const wants = (name) => part === 'all' || part === name;
const children = new Children();
const total = { passed: 0, failed: 0 };
let cluster;
let practice;

function add({ passed, failed }) {
  total.passed += passed;
  total.failed += failed;
}

/** Runs vitest, shows what failed, and reads the counts from its report. */
async function runVitest(project, env) {
  const report = join(TEST_FOLDER, `${project}.json`);
  const args = [
    'node_modules/vitest/vitest.mjs',
    'run',
    '--project',
    project,
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${report}`,
    ...filter,
  ];
  rmSync(report, { force: true });
  const words = await children.run(`The ${project} tests`, args, env).catch((error) => {
    console.log(error.message);
    return null;
  });
  const counts = existsSync(report)
    ? JSON.parse(readFileSync(report, 'utf8'))
    : { numPassedTests: 0, numFailedTests: 1 };
  const failed = counts.numFailedTests + (words === null && counts.numFailedTests === 0 ? 1 : 0);
  add({ passed: counts.numPassedTests, failed });
  return `${counts.numPassedTests} passed, ${failed} failed`;
}

async function runStories() {
  const report = join(ROOT, 'test-results', 'report.json');
  rmSync(report, { force: true });
  const env = {
    E2E_ORIGIN: `http://localhost:${practice.ports.site}`,
    E2E_INBOX: `http://127.0.0.1:${practice.ports.inbox}`,
  };
  await children
    .run('The browser stories', ['node_modules/@playwright/test/cli.js', 'test', ...filter], env)
    .catch((error) => console.log(error.message));
  const { stats } = existsSync(report)
    ? JSON.parse(readFileSync(report, 'utf8'))
    : { stats: { expected: 0, unexpected: 1, flaky: 0 } };
  add({ passed: stats.expected, failed: stats.unexpected + stats.flaky });
  return `${stats.expected} passed, ${stats.unexpected + stats.flaky} failed`;
}

async function stop() {
  await children.stop();
  await practice?.stop();
  cluster?.stop();
}

for (const signal of ['SIGINT', 'SIGTERM'])
  process.on(signal, () => void stop().then(() => process.exit(130)));

try {
  await step('Node.js', checkNode);
  await step('Packages', ensurePackages);
  if (wants('check')) add(await runChecks());
  if (wants('unit')) await step('Unit tests', () => runVitest('unit', {}));
  if (wants('integration')) {
    await step('Test cluster', async () => {
      cluster = await startTestCluster();
    });
    await step('Integration tests', () => runVitest('integration', { TEST_CLUSTER: cluster.address }));
    cluster.stop();
    cluster = undefined;
  }
  if (wants('e2e')) {
    await step('Chromium', () => {
      if (!existsSync('/usr/bin/chromium')) installDebian(['chromium'], 'Chromium');
    });
    const folder = join(TEST_FOLDER, 'practice');
    practice = await openPractice({
      folder,
      wanted: PORTS,
      fast: true,
      fresh: true,
      env: { LOG_LEVEL: 'warn' },
    });
    await step('Browser stories', runStories);
  }
} catch (error) {
  explain(error);
  total.failed += 1;
}
await stop();
console.log(`\n${total.passed} passed, ${total.failed} failed`);
process.exit(total.failed > 0 ? 1 : 0);
