import { expect, test } from '@playwright/test';
import { letterTo, signInAs } from '../support/people.ts';
import { answerReadiness, join, measureHouse } from '../support/story.ts';

test('signs in the chest hold a plan, and nothing is sold until the coach records a clearance', async ({
  browser,
  page,
}) => {
  const address = `held-${Date.now()}@skerrow.example`;
  await join(page, address);
  await answerReadiness(page, /chest/i);
  await expect(page.getByRole('heading', { name: 'A doctor first' })).toBeVisible();
  await expect(page.getByText('Your plan is held, and nothing is charged')).toBeVisible();
  await expect(page.getByRole('link', { name: 'Go on to the house' })).toHaveCount(0);
  const words = await page.getByText(/Then write to/).innerText();
  const coachName = /Then write to ([\w ]+),/.exec(words)?.[1] ?? '';

  await test.step('no door leads to a payment', async () => {
    for (const path of ['/join/plan', '/join/house', '/week', '/session']) {
      await page.goto(path);
      await expect(page, path).toHaveURL(/\/join\/result/);
    }
    const bought = await page.request.post('/join/plan', {
      form: { plan: 'coach-month', terms: 'yes' },
      headers: { origin: new URL(page.url()).origin },
      maxRedirects: 0,
    });
    expect(bought.status()).toBe(303);
    expect(bought.headers()['location']).toBe('/join');
  });

  const context = await browser.newContext();
  const coach = await context.newPage();
  await test.step('the coach finds the hold in the queue and records the clearance', async () => {
    await signInAs(coach, coachName);
    await coach
      .getByRole('complementary')
      .getByRole('link', { name: /Somebody new.*Plan held/s })
      .last()
      .click();
    await expect(coach.getByRole('heading', { name: /^Held since/ })).toBeVisible();
    await coach.getByRole('button', { name: 'Record the clearance and open the gate' }).click();
    await expect(coach.getByText('Say who cleared the member, and when.').first()).toBeVisible();
    await coach
      .getByLabel('The clearance')
      .fill('Dr Amsel, Skerrow, today: may train at an effort for talking.');
    await coach.getByRole('button', { name: 'Record the clearance and open the gate' }).click();
    await expect(coach.getByText('The clearance is recorded; the gate is open.')).toBeVisible();
  });

  await test.step('the person goes on where they left', async () => {
    await letterTo(page.request, address, /You are cleared to go on/);
    await page.goto('/join/result');
    await expect(page.getByRole('heading', { name: 'You are cleared' })).toBeVisible();
    await page.getByRole('link', { name: 'Go on to the house' }).click();
    await measureHouse(page);
    await expect(page.getByRole('button', { name: 'Go to the payment' })).toBeVisible();
  });
  await context.close();
});
