import { expect, type Page } from '@playwright/test';
import sharp from 'sharp';
import { choose, letterTo, ready } from './people.ts';

/** From the letter through readiness, house, plan and a card that needs authentication, to the first week. */
export async function join(page: Page, address: string): Promise<void> {
  await page.goto('/join');
  await page.getByLabel('E-mail address').fill(address);
  await page.getByRole('button', { name: 'Send me the letter' }).click();
  await expect(page.getByRole('heading', { name: 'Look in your letters' })).toBeVisible();
  const letter = await letterTo(page.request, address, /way in/);
  await page.goto(letter.links.find((link) => link.includes('/sign-in/confirm')) ?? '');
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page).toHaveURL(/\/join\/readiness/);
}

/** Answers every readiness question so that nothing speaks against training, unless `signs` says otherwise. */
export async function answerReadiness(page: Page, signs: RegExp = /None of these/): Promise<void> {
  await choose(page, /moved on purpose/, /Yes, all three/);
  await choose(page, /doctor ever told you/, /None of these/);
  await choose(page, /noticed any of these/, signs);
  await choose(page, /pregnant/, /No, or it does/);
  await choose(page, /How old/, '18 to 44');
  await choose(page, /medicines that slow/, 'No');
  await choose(page, /blood pressure/, /Below 160/);
  await choose(page, /ill or operated/, 'No');
  await choose(page, /How hard do you want/, /still talk/);
  await choose(page, /consent/, /Newel may keep/);
  await page.getByRole('button', { name: 'Give these answers' }).click();
  await expect(page).toHaveURL(/\/join\/result/);
}

/** Measures the house as people type: with spaces. */
export async function measureHouse(page: Page): Promise<void> {
  await page.getByLabel('Steps in one flight').fill(' 14 ');
  await page.getByLabel('Height of one step').fill('172');
  await choose(page, 'The handrail', 'One side');
  await page.getByLabel('Length').fill('180');
  await page.getByLabel('Width').fill('60');
  await page.getByLabel(/Free floor/).fill('80');
  await choose(page, /firm chair/, 'Yes');
  await page.getByLabel('Height of its seat').fill('45');
  await choose(page, /bar in a door/, 'No');
  await choose(page, /shows the pulse/, 'No');
  await page.getByRole('button', { name: 'Keep the house' }).click();
  await expect(page).toHaveURL(/\/join\/plan/);
}

/** Chooses a plan and pays with the card that the bank asks about. */
export async function payWithAuthentication(page: Page): Promise<void> {
  await choose(page, 'The plan', /With a coach, £38/);
  await page.getByRole('checkbox', { name: /I have read the terms/ }).check();
  await page.getByRole('button', { name: 'Go to the payment' }).click();
  await page.waitForURL(/\/pay\//);
  await page.locator('input[name=card][value=authenticate]').check();
  await page.locator('button[type=submit], main button').first().click();
  await page.locator('button[value=approve]').click();
  await page.waitForURL(/\/join\/payment/);
  await expect(page.getByRole('heading', { name: 'You have joined' })).toBeVisible({ timeout: 30_000 });
}

/** One test's form. */
export async function takeTest(page: Page, test: string, value: string, form?: string): Promise<void> {
  await page.goto(`/test-day/${test}`);
  if (form) await choose(page, 'How you did it', form);
  await page.locator('[name=value]').fill(value);
  await choose(page, /How hard was it/, '8');
  await choose(page, 'Did anything hurt?', 'Nothing hurt');
  await page.getByRole('button', { name: 'Write the mark' }).click();
  await expect(page).toHaveURL(/\/test-day$/);
}

/** A whole test day, results as typed. */
export async function takeTestDay(
  page: Page,
  results: { sitUps: string; pushUps: string; stairs: string },
): Promise<void> {
  await takeTest(page, 'sit-ups', results.sitUps, 'Feet held under something heavy, or by a person');
  await takeTest(page, 'push-ups', results.pushUps, 'On the knees');
  await takeTest(page, 'stairs', results.stairs);
  await page.getByRole('button', { name: 'Finish the test day' }).click();
  await expect(page).toHaveURL(/\/(week|marks)/);
}

/** The planned session, written down as asked. */
export async function logSession(page: Page): Promise<void> {
  await page.goto('/session');
  await ready(page);
  await choose(page, /How hard was the session/, '6');
  await page.getByRole('button', { name: 'Write it down' }).click();
  await expect(page).toHaveURL(/\/session\/done/);
}

/** A small JPEG that carries a place and a camera. */
export const pictureWithPlace = (): Promise<Buffer> =>
  sharp({ create: { width: 640, height: 420, channels: 3, background: '#8aa08f' } })
    .withExif({
      IFD0: { Make: 'Skerrow', Model: 'Harbour' },
      IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '54/1 3/1 0/1' },
    })
    .jpeg()
    .toBuffer();

/** Puts another card on file in the payment stand-in's portal. */
export async function changeCard(page: Page, card: 'succeeds' | 'fails-later'): Promise<void> {
  await page.waitForURL(/\/portal\//);
  const form = page.locator('form:has(input[name=card])');
  if (!(await form.isVisible())) await page.locator('details:has(input[name=card]) > summary').click();
  await form.locator(`input[name=card][value=${card}]`).check();
  await form.getByRole('button').click();
  await expect(page.locator('main')).toContainText(/card/i);
}
