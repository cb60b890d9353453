import { Children } from './children.mjs';
import { explain, step } from './steps.mjs';

const CHECKS = [
  ['Types (astro check)', ['node_modules/astro/astro.js', 'check']],
  ['Lint (eslint)', ['node_modules/eslint/bin/eslint.js', '.']],
  ['Format (prettier)', ['node_modules/prettier/bin/prettier.cjs', '--check', '--log-level', 'warn', '.']],
  ['Unused code (knip)', ['node_modules/knip/bin/knip.js', '--no-progress']],
];

/** Types, lint (with the import rule), format and unused code. All run, even when one fails. */
export async function runChecks() {
  const children = new Children();
  let failed = 0;
  for (const [name, args] of CHECKS) {
    try {
      await step(name, () => children.run(name, args, { ASTRO_TELEMETRY_DISABLED: '1' }).then(() => ''));
    } catch (error) {
      failed += 1;
      explain(error);
    }
  }
  return { passed: CHECKS.length - failed, failed };
}
