import { ensureBuilt } from './lib/build.mjs';
import { Children } from './lib/children.mjs';
import { explain, step } from './lib/steps.mjs';

try {
  await step('Build', () => ensureBuilt(new Children()));
} catch (error) {
  explain(error);
  process.exit(1);
}
