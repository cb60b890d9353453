import { expect, test } from '@playwright/test';
import { ready, signInAs } from '../support/people.ts';
import { listenForRefusals, weigh } from '../support/traffic.ts';

const KB = 1024;
/** What the home's small island may weigh; the budget of public scripts leaves it out. */
const ISLAND_BYTES = 20 * KB;
const PUBLIC = [
  '/plans',
  '/tests',
  '/cautions',
  '/methods',
  '/lessons',
  '/privacy',
  '/terms',
  '/sign-in',
  '/join',
];
const MEMBER = [
  '/week',
  '/flight',
  '/session',
  '/test-day',
  '/test-day/push-ups',
  '/marks',
  '/marks/new?test=push-ups',
  '/check-in',
  '/house',
  '/account',
  '/account/membership',
];

test('public pages weigh at most 120 KB with their fonts, 2 KB of it script', async ({ page }) => {
  const refused = await listenForRefusals(page);
  await page.goto('/lessons');
  const free = await page.locator('main a[href^="/lessons/"]').first().getAttribute('href');
  await page.goto('/methods');
  const method = await page.locator('main a[href^="/methods/"]').first().getAttribute('href');
  for (const path of [...PUBLIC, method ?? '', free ?? '']) {
    const { allBytes, scriptBytes, strangers } = await weigh(page, path);
    expect.soft(strangers, `${path} asks no other host`).toEqual([]);
    expect.soft(allBytes, `${path} in all`).toBeLessThanOrEqual(120 * KB);
    expect.soft(scriptBytes, `${path} script`).toBeLessThanOrEqual(2 * KB);
  }
  expect(refused).toEqual([]);
});

test('the home weighs at most 120 KB before its island, and the island is small', async ({ page }) => {
  const refused = await listenForRefusals(page);
  const { allBytes, scriptBytes, strangers } = await weigh(page, '/');
  expect(strangers).toEqual([]);
  expect(scriptBytes, 'the island and its library').toBeLessThanOrEqual(ISLAND_BYTES);
  expect(allBytes - Math.max(0, scriptBytes - 2 * KB), 'all but the island').toBeLessThanOrEqual(120 * KB);
  expect(refused).toEqual([]);
});

test('member pages send at most 100 KB of script, lessons 5 KB', async ({ page }) => {
  const refused = await listenForRefusals(page);
  await signInAs(page, 'Edda Rooke');
  for (const path of MEMBER) {
    const { scriptBytes, strangers } = await weigh(page, path);
    expect.soft(strangers, `${path} asks no other host`).toEqual([]);
    expect.soft(scriptBytes, `${path} script`).toBeLessThanOrEqual(100 * KB);
  }
  await page.goto('/lessons');
  const lessons = await page
    .locator('main a[href^="/lessons/"]')
    .evaluateAll((links) => links.map((link) => link.getAttribute('href') ?? ''));
  for (const path of [lessons[0] ?? '', lessons.at(-1) ?? '']) {
    const { scriptBytes } = await weigh(page, path);
    expect.soft(scriptBytes, `${path} script`).toBeLessThanOrEqual(5 * KB);
  }
  expect(refused).toEqual([]);
});

test('the desk sends at most 150 KB of script', async ({ page }) => {
  const refused = await listenForRefusals(page);
  await signInAs(page, 'Odile Brandt');
  const letter = await page.locator('main a[href^="/desk/"]').first().getAttribute('href');
  expect(letter).not.toBeNull();
  for (const path of ['/desk', '/caseload', letter ?? '']) {
    const settle = path === letter ? ready : undefined;
    const { scriptBytes, strangers } = await weigh(page, path, settle);
    expect.soft(strangers, `${path} asks no other host`).toEqual([]);
    expect.soft(scriptBytes, `${path} script`).toBeLessThanOrEqual(150 * KB);
  }
  expect(refused).toEqual([]);
});
