import { NEWEL_FOLDER } from './lib/postgres.mjs';
import { openPractice } from './lib/practice.mjs';
import { PORTS } from './lib/ports.mjs';
import { explain } from './lib/steps.mjs';

/** `npm run reset`: empties the demo practice and fills it again. */
try {
  const practice = await openPractice({ folder: NEWEL_FOLDER, wanted: PORTS, fresh: true });
  await practice.stop();
  console.log('Emptied and filled again. npm start opens it.');
} catch (error) {
  explain(error);
  process.exit(1);
}
