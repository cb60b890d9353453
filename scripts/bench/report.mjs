const table = (heads, rows) =>
  [heads, heads.map((_, index) => (index === 0 ? '---' : '---:')), ...rows].map(
    (cells) => `| ${cells.join(' | ')} |`,
  );
const ms = ({ ms: middle, least, most }) => `${middle.toFixed(1)} (${least.toFixed(1)}–${most.toFixed(1)})`;
const rate = (value) => Math.round(value).toLocaleString('en-GB');

/** One run as Markdown. */
export function report({ machine, start, small, large, repeats, shares, prerendered, memory, seconds }) {
  return [
    '# The bench',
    '',
    `Printed by \`npm run bench\`, one run of ${seconds.toFixed(0)} s. Medians, least and most in brackets. The loads come from`,
    'a process of their own on the same machine, so the rates say little alone; the shares compare like with like.',
    '',
    `${machine.processors} processors; load average before the run ${machine.busy.toFixed(1)}. Above ${machine.processors} the machine was`,
    'busy with something else, and times and shares are worse than they would be alone.',
    '',
    '## Start',
    '',
    ...table(['', 'seconds', 'goal'], [['second start to the first page', start.toFixed(1), '≤ 5']]),
    '',
    '## Pages: milliseconds in the server and queries a page',
    '',
    'The session’s own query is counted. The same member and coach in both sizes; the last row has one coach with 1,000.',
    '',
    ...table(
      [
        'page',
        `${small.members} members, ms`,
        'queries',
        `${large.members.toLocaleString('en-GB')} members, ms`,
        'queries',
        'repeated',
      ],
      large.pages.map((page, index) => {
        const before = small.pages[index];
        const first = before ? [ms(before), before.statements.length] : ['', ''];
        return [page.name, ...first, ms(page), page.statements.length, repeats(page.statements)];
      }),
    ),
    '',
    '## Share of a bare node:http and pg server that runs the same queries',
    '',
    ...table(
      ['page, 5,000 members', 'ours, requests/s', 'bare, requests/s', 'share', 'goal'],
      [
        ...shares.map((one) => [one.name, rate(one.product), rate(one.bare), share(one), '≥ 0.25']),
        [
          'prerendered /cautions, against an empty reply',
          rate(prerendered.product),
          rate(prerendered.bare),
          share(prerendered),
          '≥ 0.75',
        ],
      ],
    ),
    '',
    '## Resident memory after the load',
    '',
    ...table(
      ['process', 'MB', 'goal'],
      [
        ['web', memory.web.toFixed(0), '≤ 300'],
        [
          `worker, after ${memory.letters.toLocaleString('en-GB')} letters`,
          memory.worker.toFixed(0),
          '≤ 200',
        ],
      ],
    ),
    '',
  ].join('\n');
}

const share = ({ share: middle, least, most }) =>
  `${middle.toFixed(2)} (${least.toFixed(2)}–${most.toFixed(2)})`;
