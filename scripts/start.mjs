import { checkNode } from './lib/packages.mjs';
import { PORTS } from './lib/ports.mjs';
import { NEWEL_FOLDER } from './lib/postgres.mjs';
import { openPractice } from './lib/practice.mjs';
import { explain } from './lib/steps.mjs';

/** `npm start` and, with --dev, `npm run dev`: see README.md. */
const dev = process.argv.includes('--dev');

let practice;
let stopping = false;

async function stop(code) {
  if (stopping) return;
  stopping = true;
  await practice?.stop();
  process.exit(code);
}

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
  process.on(signal, () => {
    console.log('\nClosing. What was kept stays.');
    void stop(0);
  });
}

try {
  checkNode();
  practice = await openPractice({
    folder: NEWEL_FOLDER,
    wanted: PORTS,
    dev,
    onExit: (code) => {
      if (stopping) return;
      console.error(`\nA part ended by itself with code ${code}; closing the rest.`);
      void stop(1);
    },
  });
  const { ports } = practice;
  console.log(`
  The site                http://localhost:${ports.site}
  The mail inbox          http://127.0.0.1:${ports.inbox}
  The payment stand-in    http://127.0.0.1:${ports.payments}
  The practice's clock    http://localhost:${ports.site}/demo

  Sign in                 on the sign-in page choose by name: Ines Tarrant (owner), Odile Brandt or
                          Tomasz Wren (coaches), Edda Rooke and others (members); or join with any
                          address and open the letter in the inbox.
  Ctrl-C closes everything.`);
} catch (error) {
  explain(error);
  await stop(1);
}
