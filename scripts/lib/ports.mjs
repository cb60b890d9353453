import { createServer } from 'node:net';

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
