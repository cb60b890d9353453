import { execFile } from 'node:child_process';
import { createRequire } from 'node:module';
import { promisify } from 'node:util';

const AUTOCANNON = createRequire(import.meta.url).resolve('autocannon/autocannon.js');
const SECONDS = 2;
const CONNECTIONS = 8;
/** The first round warms both up and is dropped. */
const ROUNDS = 4;

/** Requests a second that one address answers, measured from a process of its own. */
async function rate(url, headers) {
  const flags = Object.entries(headers).flatMap(([name, value]) => ['-H', `${name}=${value}`]);
  const args = [AUTOCANNON, '--json', '-c', String(CONNECTIONS), '-d', String(SECONDS), ...flags, url];
  const { stdout } = await promisify(execFile)(process.execPath, args);
  const said = JSON.parse(stdout);
  if (said.non2xx > 0 || said.errors > 0)
    throw new Error(`${new URL(url).pathname} did not answer 200 to all`);
  return said.requests.average;
}

export const median = (values) => {
  const sorted = values.toSorted((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2;
};

/** Both addresses by turns; the product's share of the bare one in each round, and both rates. */
export async function shareOf(product, bare, headers) {
  const rounds = [];
  for (let round = 0; round < ROUNDS; round += 1) {
    rounds.push({ product: await rate(product, headers), bare: await rate(bare, headers) });
  }
  const kept = rounds.slice(1);
  const shares = kept.map((one) => one.product / one.bare);
  return {
    product: median(kept.map((one) => one.product)),
    bare: median(kept.map((one) => one.bare)),
    share: median(shares),
    least: Math.min(...shares),
    most: Math.max(...shares),
  };
}
