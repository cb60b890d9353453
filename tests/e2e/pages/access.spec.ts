import { expect, test, type APIRequestContext, type APIResponse, type Browser } from '@playwright/test';
import { readdirSync, readFileSync } from 'node:fs';
import { letterTo, signInAs } from '../support/people.ts';

type Role = 'visitor' | 'member' | 'coach' | 'owner';
const ROLES: readonly Role[] = ['visitor', 'member', 'coach', 'owner'];
const ABSENT = '00000000-0000-4000-8000-000000000000';

/** Everything that anybody may open. */
const OPEN = new Set(
  `/ /plans /lessons /lessons/[...slug] /demo /robots.txt /rss.xml /sitemap.xml /sign-in /sign-in/sent /sign-in/confirm
   /sign-out /unsubscribe /join /api/webhooks/stripe`.split(/\s+/),
);

/** Everything else, and whose it is. A square bracket stands for a record that does not exist. */
const WHOSE: Record<string, readonly Role[]> = {
  '/account': ROLES,
  '/account/sessions': ROLES,
  '/account/membership': ['member'],
  '/account/records': ['visitor', 'member'],
  '/account/records.json': ['visitor', 'member'],
  '/week': ['member'],
  '/flight': ['member'],
  '/session': ['member'],
  '/session/done': ['member'],
  '/test-day': ['member'],
  '/test-day/[test]': ['member'],
  '/marks': ['member'],
  '/marks/new': ['member'],
  '/check-in': ['member'],
  '/stop': ['member'],
  '/held': ['member'],
  '/readiness': ['member'],
  '/house': ['member'],
  '/house/card': ['visitor', 'member'],
  '/join/readiness': ['visitor'],
  '/join/result': ['visitor'],
  '/join/house': ['visitor'],
  '/join/plan': ['visitor', 'member'],
  '/join/payment': ['visitor', 'member'],
  '/desk': ['coach'],
  '/desk/[member]': ['coach'],
  '/caseload': ['coach'],
  '/practice': ['owner'],
  '/practice/people': ['owner'],
  '/practice/plans': ['owner'],
  '/practice/money': ['owner'],
  '/practice/audit': ['owner'],
  '/photos/[id]': ['member', 'coach'],
  '/api/desk/queue': ['coach'],
};

/** These show one record: here one that does not exist. */
const ofOneRecord = (route: string) => route.includes('[') || route === '/session/done';

/** Endpoints that only take a POST or PUT. */
const WRITES: Record<string, readonly Role[]> = {
  '/api/join/payment': ['visitor', 'member'],
  '/api/check-ins': ['member'],
  '/api/messages': ['member'],
  '/api/photos': ['member'],
  '/api/sessions/[id]': ['member'],
  '/api/desk/answer': ['coach'],
  '/api/drafts/[key]': ['member', 'coach'],
};

/** The routes of the product, from its files. */
const routes = () =>
  readdirSync('src/pages', { recursive: true, encoding: 'utf8' })
    .filter((file) => /\.(astro|ts)$/.test(file))
    .filter((file) => !readFileSync(`src/pages/${file}`, 'utf8').includes('prerender = true'))
    .map((file) => `/${file.replace(/\.(astro|ts)$/, '')}`.replace(/\/index$/, '') || '/');

const addressOf = (route: string) => route.replace(/\[[^\]]+\]/, ABSENT);
const get = (request: APIRequestContext, route: string) => request.get(addressOf(route), { maxRedirects: 0 });

/** Somebody of each role, signed in. The visitor has asked for a letter and pressed the button, no more. */
async function everybody(browser: Browser): Promise<Record<Role, APIRequestContext>> {
  const names = { member: 'Edda Rooke', coach: 'Odile Brandt', owner: 'Ines Tarrant' };
  const visitor = await browser.newPage();
  const address = `access-${Date.now()}@skerrow.example`;
  await visitor.goto('/sign-in');
  await visitor.getByLabel('E-mail address').fill(address);
  await visitor.getByRole('button', { name: 'Send me the letter' }).click();
  const { links } = await letterTo(visitor.request, address, /./);
  const link = links.find((each) => each.includes('/sign-in/confirm')) ?? '';
  // What a mail scanner does before anybody reads the letter: it spends nothing.
  for (const look of ['head', 'get', 'get'] as const)
    expect((await visitor.request[look](link)).status()).toBe(200);
  await visitor.goto(link);
  await visitor.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(visitor).not.toHaveURL(/sign-in/);
  const signedIn = async (name: string) => {
    const page = await (await browser.newContext()).newPage();
    await signInAs(page, name);
    return page.request;
  };
  return {
    visitor: visitor.request,
    member: await signedIn(names.member),
    coach: await signedIn(names.coach),
    owner: await signedIn(names.owner),
  };
}

/** Nothing of the page came out: a refusal, or the way to the page that is theirs. */
function expectRefused(reply: APIResponse, role: Role, route: string): void {
  const to = reply.headers()['location'] ?? '';
  const shown = `${role} ${route} ${reply.status()} ${to}`;
  if (role === 'visitor' && reply.status() === 303) expect(to, shown).toMatch(/^\/join/);
  else expect(reply.status(), shown).toBe(403);
}

test('every route of the product stands in the table of who may open it', () => {
  const known = [...OPEN, ...Object.keys(WHOSE), ...Object.keys(WRITES)];
  expect(routes().sort()).toEqual(known.sort());
});

test('nobody signed out sees anything but the open pages', async ({ request }) => {
  for (const route of Object.keys(WHOSE)) {
    const reply = await get(request, route);
    if (route.startsWith('/api/') || route.endsWith('.json') || route.startsWith('/photos/'))
      expect([401, 303], route).toContain(reply.status());
    else
      expect([reply.status(), reply.headers()['location']?.split('?')[0]], route).toEqual([303, '/sign-in']);
  }
});

test('each role opens its own pages and no others', async ({ browser }) => {
  const people = await everybody(browser);
  for (const [route, allowed] of Object.entries(WHOSE)) {
    for (const role of ROLES) {
      const reply = await get(people[role], route);
      if (!allowed.includes(role)) expectRefused(reply, role, route);
      else if (ofOneRecord(route)) expect([404, 303], `${role} ${route}`).toContain(reply.status());
      // Somebody who has only just come has no house yet, so its card is not there.
      else if (role === 'visitor') expect([200, 303, 404], `${role} ${route}`).toContain(reply.status());
      else expect([200, 303], `${role} ${route}`).toContain(reply.status());
    }
  }
});

test('each role writes only where it may, before anything else is looked at', async ({
  browser,
  baseURL,
  request,
}) => {
  const people = { ...(await everybody(browser)), nobody: request };
  const headers = {
    origin: baseURL ?? '',
    'content-type': 'application/json',
    'idempotency-key': 'k'.repeat(20),
  };
  for (const [route, allowed] of Object.entries(WRITES)) {
    for (const [role, person] of Object.entries(people)) {
      const send = route === '/api/drafts/[key]' ? person.put : person.post;
      const reply = await send.call(person, addressOf(route), { headers, data: '{', maxRedirects: 0 });
      const expected =
        role === 'nobody' ? [401] : allowed.includes(role as Role) ? [200, 400, 404, 415, 422] : [403];
      expect(expected, `${role} ${route} ${reply.status()}`).toContain(reply.status());
    }
  }
});

test("another coach's member answers as one who does not exist", async ({ browser }) => {
  const [mine, theirs] = [await browser.newContext(), await browser.newContext()];
  const page = await theirs.newPage();
  await signInAs(page, 'Tomasz Wren');
  await page.goto('/caseload');
  const address = await page.locator('a[href^="/desk/"]').first().getAttribute('href');
  expect((await page.request.get(address ?? '')).status()).toBe(200);
  const other = await mine.newPage();
  await signInAs(other, 'Odile Brandt');
  const [foreign, absent] = [
    await other.request.get(address ?? ''),
    await other.request.get(`/desk/${ABSENT}`),
  ];
  expect([foreign.status(), absent.status()]).toEqual([404, 404]);
  expect(await foreign.text()).toBe(await absent.text());
});
