import { expect, test, type Page } from '@playwright/test';
import { choose, ready, signInAs } from '../support/people.ts';

const WHEN_HARD = /How hard was it/;

/** How many marks the member's own records hold. */
async function countMarks(page: Page): Promise<number> {
  const records = (await (await page.request.get('/account/records.json')).json()) as { marks: unknown[] };
  return records.marks.length;
}

async function fillMark(page: Page, value: string): Promise<void> {
  await page.goto('/marks/new?test=push-ups');
  const forms = page.getByRole('group', { name: 'How you did it' }).getByRole('radio');
  await forms.first().check();
  await page.locator('[name=value]').fill(value);
  await choose(page, WHEN_HARD, '7');
  await choose(page, 'Did anything hurt?', 'Nothing hurt');
}

test('a number is read as people type it, and a wrong one is answered beside the field', async ({ page }) => {
  await signInAs(page, 'Ilse Varga');
  const before = await countMarks(page);
  const wrong: [string, RegExp][] = [
    ['', /Give the result of push-ups/i],
    ['twelve', /Only the number, without words/],
    ['-3', /cannot be below zero/],
    ['12,5', /Whole numbers only/],
    ['900', /900|at most|more than/i],
    ['1 000', /1,?000|at most|more than/i],
  ];
  for (const [typed, answer] of wrong) {
    await fillMark(page, typed);
    await page.getByLabel('Conditions').fill('Before breakfast, bare feet.');
    const reply = page.waitForResponse((each) => each.request().method() === 'POST');
    await page.getByRole('button', { name: 'Write the mark' }).click();
    expect((await reply).status(), typed).toBe(422);
    const summary = page.getByRole('alert');
    await expect(summary, typed).toContainText('There is a problem');
    await expect(summary).toBeFocused();
    const box = page.locator('[name=value]');
    await expect(box).toHaveAttribute('aria-invalid', 'true');
    await expect(box, 'kept as typed').toHaveValue(typed);
    await expect(page.getByLabel('Conditions')).toHaveValue('Before breakfast, bare feet.');
    await expect(page.locator('#value-fault'), typed).toHaveText(answer);
  }
  expect(await countMarks(page)).toBe(before);
  await fillMark(page, ' 14 ');
  await page.getByRole('button', { name: 'Write the mark' }).click();
  await expect(page.getByText('The mark is written.')).toBeVisible();
  expect(await countMarks(page)).toBe(before + 1);
});

test('a form sent twice stores once', async ({ page }) => {
  await signInAs(page, 'Wilf Oram');
  const before = await countMarks(page);
  await fillMark(page, '11');
  const form = await page
    .locator('main form')
    .evaluate((element: HTMLFormElement) =>
      [...new FormData(element)].map(([name, value]) => [name, String(value)]),
    );
  const send = () =>
    page.request.post('/marks/new?test=push-ups', {
      form: Object.fromEntries(form) as Record<string, string>,
      headers: { origin: new URL(page.url()).origin },
      maxRedirects: 0,
    });
  const replies = await Promise.all([send(), send()]);
  expect(replies.map((reply) => reply.status())).toEqual([303, 303]);
  await page.getByRole('button', { name: 'Write the mark' }).click();
  await expect(page.getByText('The mark is written.')).toBeVisible();
  expect(await countMarks(page)).toBe(before + 1);
});

test('a session that ends in mid-form loses no word, and shows none to the next person', async ({ page }) => {
  const words = 'Stairs went well until the fourth flight; the rail side is the stiff one.';
  await signInAs(page, 'Hettle Oram');
  await page.goto('/check-in');
  await ready(page);
  await page.context().clearCookies();
  await page.getByLabel('A line to').fill(words);
  await page.getByRole('button', { name: 'Send the line' }).click();
  await expect(page.locator('#line-fault')).toContainText(/sign in/i);
  await expect(page.getByLabel('A line to')).toHaveValue(words);

  await signInAs(page, 'Wilf Oram');
  await page.goto('/check-in');
  await ready(page);
  await expect(page.getByLabel('A line to')).toHaveValue('');

  await page.context().clearCookies();
  await signInAs(page, 'Hettle Oram');
  await page.goto('/check-in');
  await ready(page);
  await expect(page.getByLabel('A line to')).toHaveValue(words);
  await page.getByRole('button', { name: 'Send the line' }).click();
  await expect(page.getByText('Your line is in the thread.')).toBeVisible();
  await expect(page.getByText(words)).toHaveCount(1);
});

test('a file that is no picture is refused by what it is, and the words stay', async ({ page }) => {
  await signInAs(page, 'Joss Amadi');
  await page.goto('/check-in');
  await ready(page);
  await page.getByLabel('In your words').fill('A quiet week.');
  const text = Buffer.from('This is a letter, whatever its name says.');
  await page.locator('#photo').setInputFiles({ name: 'mat.jpg', mimeType: 'image/jpeg', buffer: text });
  await expect(page.locator('#photo-fault')).toHaveText(
    'That file is not a picture we can read. Send a JPEG, PNG or WebP.',
  );
  await expect(page.getByLabel('In your words')).toHaveValue('A quiet week.');
  await expect(page.locator('#photo'), 'another can be chosen').toBeVisible();
});

test('two tabs that write down one session: the second is told so', async ({ page, context }) => {
  await signInAs(page, 'Tilda Brock');
  const other = await context.newPage();
  for (const tab of [page, other]) {
    await tab.goto('/session');
    await ready(tab);
  }
  await choose(page, /How hard was the session/, '6');
  await page.getByRole('button', { name: 'Write it down' }).click();
  await expect(page).toHaveURL(/\/session\/done/);

  await choose(other, /How hard was the session/, '9');
  await other.getByLabel('A word to yourself').fill('From the other tab.');
  await other.getByRole('button', { name: 'Write it down' }).click();
  await expect(other.getByRole('alert')).toContainText('This session is written down already');
  await expect(other.getByLabel('A word to yourself')).toHaveValue('From the other tab.');
});
