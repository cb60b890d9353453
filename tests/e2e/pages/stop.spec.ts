import { expect, test } from '@playwright/test';
import { letterTo, signInAs } from '../support/people.ts';

test('Stop fills the screen, tells the coach and holds the plan until it is cleared', async ({
  browser,
  page,
}) => {
  await signInAs(page, 'Petra Lund');
  await page.goto('/session');
  await page.getByRole('link', { name: /Stop/ }).first().click();
  await expect(page).toHaveURL(/\/stop$/);

  await test.step('the whole screen says stop, with one way to help', async () => {
    const dialog = page.getByRole('alertdialog', { name: 'Stop. Sit or lie down.' });
    await expect(dialog).toBeVisible();
    await expect(page.getByRole('navigation')).toHaveCount(0);
    const call = page.getByRole('link', { name: 'Call emergency services' });
    await expect(call).toBeInViewport();
    await expect(call).toHaveAttribute('href', 'tel:112');
    const ground = await page.evaluate(() => getComputedStyle(document.body).backgroundColor);
    expect(ground).not.toBe('rgba(0, 0, 0, 0)');
  });

  await page.getByRole('button', { name: /chest/i }).click();
  await expect(page.getByText(/has been told\. Your plan is held/)).toBeVisible();
  await page.getByRole('link', { name: /I am safe/ }).click();
  await expect(page.getByRole('heading', { name: 'The gate is shut for now' })).toBeVisible();

  await test.step('nothing that trains opens any more', async () => {
    for (const path of ['/session', '/test-day', '/marks/new?test=push-ups']) {
      await page.goto(path);
      await expect(page, path).toHaveURL(/\/held$/);
    }
  });

  const context = await browser.newContext();
  const coach = await context.newPage();
  await test.step('the alert stands first at the desk, and the clearance opens the gate', async () => {
    await letterTo(page.request, 'tomasz.wren@skerrow.example', /Stop pressed by Petra Lund/);
    await signInAs(coach, 'Tomasz Wren');
    await coach
      .getByRole('complementary')
      .getByRole('link', { name: /Petra Lund/ })
      .click();
    await expect(coach.getByText('Reported')).toBeVisible();
    await coach.getByLabel('The clearance').fill('Seen in Skerrow today, nothing found: may go on, lower.');
    await coach.getByRole('button', { name: 'Record the clearance and open the gate' }).click();
    await expect(coach.getByText('The clearance is recorded; the gate is open.')).toBeVisible();
    await expect(coach.getByText('Reported')).toHaveCount(0);
  });
  await context.close();
  await page.goto('/session');
  await expect(page).toHaveURL(/\/session$/);
});
