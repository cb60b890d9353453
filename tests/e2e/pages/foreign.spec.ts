import { randomUUID } from 'node:crypto';
import { expect, test, type APIResponse, type Browser, type Page } from '@playwright/test';
import { signInAs } from '../support/people.ts';

interface Records {
  trainingSessions: { id: string; doneAt: string | null }[];
}

const recordsOf = async (page: Page) =>
  (await (await page.request.get('/account/records.json')).json()) as Records;

async function personIn(browser: Browser, name: string): Promise<Page> {
  const page = await (await browser.newContext()).newPage();
  await signInAs(page, name);
  return page;
}

/** What a reply tells: its status and words, without the one id that differs from request to request. */
const told = async (reply: APIResponse) => ({
  status: reply.status(),
  words: (await reply.text()).replace(/"requestId":"[^"]+"/, ''),
});

test('a locked lesson’s words are in no reply to a visitor', async ({ browser, page }) => {
  const member = await personIn(browser, 'Edda Rooke');
  await page.goto('/lessons');
  const free = await page
    .locator('main a[href^="/lessons/"]')
    .evaluateAll((links) => links.map((link) => link.getAttribute('href') ?? ''));
  await member.goto('/lessons');
  const open = await member
    .locator('main a[href^="/lessons/"]')
    .evaluateAll((links) => links.map((link) => link.getAttribute('href') ?? ''));
  const locked = open.filter((path) => !free.includes(path));
  expect(locked.length).toBeGreaterThan(0);
  for (const path of locked) {
    await member.goto(path);
    const paragraphs = (await member.locator('article p, main p').allInnerTexts()).filter(
      (words) => words.length > 80,
    );
    expect(paragraphs.length, `${path} has words`).toBeGreaterThan(0);
    const replies = await Promise.all([
      page.request.get(path, { maxRedirects: 0 }),
      page.request.get(path),
      page.request.get(`${path}.html`),
      page.request.get(`${path}/index.html`),
      page.request.get('/rss.xml'),
      page.request.get('/sitemap.xml'),
    ]);
    const everything = (await Promise.all(replies.map((reply) => reply.text())))
      .join('\n')
      .replace(/\s+/g, ' ');
    const own = paragraphs.filter((words) => !everything.includes(words.replace(/\s+/g, ' ')));
    // Cautions stand on every page of ours; what is left must be the lesson's own.
    expect(own.length, path).toBeGreaterThan(paragraphs.length / 2);
    expect(replies[0]?.status(), path).toBe(303);
  }
  await member.context().close();
});

test('another’s session, picture and letter answer as if they were not there', async ({ browser }) => {
  const owner = await personIn(browser, 'Edda Rooke');
  const other = await personIn(browser, 'Wilf Oram');
  const planned = (await recordsOf(owner)).trainingSessions.find(({ doneAt }) => doneAt === null);
  const done = (await recordsOf(owner)).trainingSessions.find(({ doneAt }) => doneAt !== null);
  expect(planned && done).toBeTruthy();
  const origin = new URL(other.url()).origin;
  const write = (id: string) =>
    other.request.post(`/api/sessions/${id}`, {
      headers: { origin, 'idempotency-key': randomUUID() },
      data: {
        items: [{ id: randomUUID(), doneTotal: 1, pain: 'none' }],
        effort: 5,
        minutes: 20,
        pain: 'none',
      },
    });
  const [foreign, absent] = [
    await told(await write(planned?.id ?? '')),
    await told(await write(randomUUID())),
  ];
  expect(foreign.status).toBe(404);
  expect(foreign).toEqual(absent);

  const page = async (id: string) => told(await other.request.get(`/session/done?id=${id}`));
  expect((await page(done?.id ?? '')).status).toBe(404);
  expect((await page(done?.id ?? '')).words).toBe((await page(randomUUID())).words);
  for (const path of [`/desk/${randomUUID()}`, '/desk', '/practice', '/caseload', '/api/desk/queue'])
    expect([403, 404], path).toContain((await other.request.get(path)).status());
  await owner.context().close();
  await other.context().close();
});

test('a coach reaches own members only; the owner reaches none', async ({ browser }) => {
  const odile = await personIn(browser, 'Odile Brandt');
  const tomasz = await personIn(browser, 'Tomasz Wren');
  const ines = await personIn(browser, 'Ines Tarrant');
  await odile.goto('/caseload');
  const path = (await odile.locator('main a[href^="/desk/"]').first().getAttribute('href')) ?? '';
  expect((await odile.request.get(path)).status()).toBe(200);
  const foreign = await told(await tomasz.request.get(path));
  expect(foreign.status).toBe(404);
  expect(foreign).toEqual(await told(await tomasz.request.get(`/desk/${randomUUID()}`)));
  expect([403, 404]).toContain((await ines.request.get(path)).status());
  for (const page of [odile, tomasz, ines]) await page.context().close();
});
