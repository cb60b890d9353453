import { runChecks } from './lib/checks.mjs';
import { ensurePackages } from './lib/packages.mjs';
import { explain, step } from './lib/steps.mjs';

try {
  await step('Packages', ensurePackages);
} catch (error) {
  explain(error);
  process.exit(1);
}
const { failed } = await runChecks();
process.exit(failed > 0 ? 1 : 0);
