import { createServer } from 'node:net';

/** Where the demo is found when nothing else sits there. */
export const PORTS = { site: 4321, database: 4322, payments: 4323, inbox: 4324, smtp: 4325, objects: 4327 };

const isFree = (port) =>
  new Promise((done) => {
    const probe = createServer();
    probe.once('error', () => done(false));
    probe.listen(port, '127.0.0.1', () => probe.close(() => done(true)));
  });

/** The wanted port of each name, or the next free one. `moved` says in words which ones were taken. */
export async function choosePorts(wanted) {
  const ports = {};
  const moved = [];
  const given = new Set();
  for (const [name, first] of Object.entries(wanted)) {
    let port = first;
    while (given.has(port) || !(await isFree(port))) port += 1;
    given.add(port);
    ports[name] = port;
    if (port !== first) moved.push(`${name}: ${first} is taken, ${port} instead`);
  }
  return { ports, moved };
}
