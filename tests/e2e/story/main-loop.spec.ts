import { expect, test, type Page } from '@playwright/test';
import sharp from 'sharp';
import { expectNoFindings } from '../support/axe.ts';
import { choose, letterTo, moveClock, ready, signInAs } from '../support/people.ts';
import {
  answerReadiness,
  changeCard,
  join,
  logSession,
  measureHouse,
  payWithAuthentication,
  pictureWithPlace,
  takeTestDay,
} from '../support/story.ts';
import { listenForRefusals } from '../support/traffic.ts';

test('the main loop: join, get cleared, test, train, check in, be answered, test again, pay, leave', async ({
  browser,
  page,
}, info) => {
  test.setTimeout(600_000);
  const name = `Story ${Date.now().toString(36)}`;
  const address = `${name.toLowerCase().replace(' ', '-')}@skerrow.example`;
  const width = info.project.name.replace('story-', '');
  let picture = 0;
  const snap = async (name: string, of: Page = page) => {
    picture += 1;
    // Pencil marks that are still being drawn are not what is looked at.
    await of.emulateMedia({ reducedMotion: 'reduce' });
    await of.screenshot({
      path: `test-results/story-${width}/${String(picture).padStart(2, '0')}-${name}.png`,
      fullPage: true,
    });
    await expectNoFindings(of, name);
  };
  const refused = await listenForRefusals(page);

  await test.step('joins by letter, questions, house and a card that needs authentication', async () => {
    await page.goto('/');
    await snap('home');
    await join(page, address);
    await snap('readiness');
    await answerReadiness(page);
    await expect(page.getByRole('heading', { name: 'You can begin' })).toBeVisible();
    await snap('result');
    await page.getByRole('link', { name: 'Go on to the house' }).click();
    await snap('house');
    await measureHouse(page);
    await snap('plan');
    await payWithAuthentication(page);
    await snap('joined');
    await letterTo(page.request, address, /You have joined/);
  });

  await test.step('takes the baseline', async () => {
    await page.goto('/week');
    await expect(page.getByRole('heading', { name: 'First, where you stand' })).toBeVisible();
    await snap('week-before');
    await takeTestDay(page, { sitUps: ' 20 ', pushUps: '10', stairs: '108' });
    await expect(page.getByRole('heading', { name: 'The first tread' })).toBeVisible();
    await snap('week-one');
  });

  await test.step('trains three times, writes a mark and a check-in with a picture', async () => {
    for (const _ of [1, 2, 3]) await logSession(page);
    await snap('session-done');
    await page.goto('/marks/new?test=push-ups');
    await choose(page, 'How you did it', 'On the knees');
    await page.locator('[name=value]').fill('11');
    await choose(page, /How hard was it/, '9');
    await choose(page, 'Did anything hurt?', 'Nothing hurt');
    await page.getByRole('button', { name: 'Write the mark' }).click();
    await expect(page.getByText('The mark is written.')).toBeVisible();
    await page.goto('/check-in');
    await ready(page);
    await page.getByLabel('In your words').fill('Three sessions, the last one before breakfast.');
    await choose(page, 'The week went', 'well');
    await choose(page, 'You slept', 'fairly');
    await choose(page, 'You were sore', 'a little');
    await choose(page, /Effort of the week/, '6');
    await page
      .locator('#photo')
      .setInputFiles({ name: 'mat.jpg', mimeType: 'image/jpeg', buffer: await pictureWithPlace() });
    await expect(page.getByText('goes with it.')).toBeVisible();
    await page.reload();
    await ready(page);
    await expect(page.getByLabel('In your words')).toHaveValue(/before breakfast/);
    await snap('check-in');
    await page.getByRole('button', { name: /^Send to/ }).click();
    await expect(page.getByRole('heading', { name: 'This week is told' })).toBeVisible();
    const photo = page.locator('figure img').last();
    await expect
      .poll(async () => (await page.request.get((await photo.getAttribute('src')) ?? '')).status(), {
        timeout: 20_000,
      })
      .toBe(200);
    const served = await (await page.request.get((await photo.getAttribute('src')) ?? '')).body();
    expect((await sharp(served).metadata()).exif).toBeUndefined();
    await page.goto('/account');
    await page.getByLabel('Name').fill(name);
    await page.getByLabel('Date of birth').fill('7 Nov 1990');
    await choose(page, /^Sex/, 'Female');
    await page.getByRole('button', { name: 'Keep this' }).click();
    await expect(page.getByText('Kept.')).toBeVisible();
  });

  const coachPage = await (await browser.newContext({ viewport: page.viewportSize() })).newPage();
  await test.step('the coach finds it in the queue, answers and changes a target', async () => {
    for (const coach of ['Odile Brandt', 'Tomasz Wren']) {
      await signInAs(coachPage, coach);
      if (await coachPage.getByRole('link', { name: new RegExp(name) }).count()) break;
      await coachPage.context().clearCookies();
    }
    await snap('desk', coachPage);
    await coachPage
      .getByRole('link', { name: new RegExp(name) })
      .first()
      .click();
    await ready(coachPage);
    await expect(coachPage.getByText('the last one before breakfast').first()).toBeVisible();
    await coachPage.getByText('Change it in red').first().click();
    const red = coachPage.locator('form:has([name=do][value=target])').first();
    await red.getByLabel(/^A set/).fill('7');
    await red.getByLabel('Why').fill('Seven straight ones beat nine crooked ones.');
    await red.getByRole('button', { name: 'Write it in red' }).click();
    await expect(coachPage.getByText('Written in red.')).toBeVisible();
    await ready(coachPage);
    await coachPage
      .getByLabel(/Your answer to/)
      .fill('A good first week. Sevens in red, with the reason beside them.');
    await snap('dossier', coachPage);
    await coachPage.getByRole('button', { name: /^Send/ }).click();
    await expect(coachPage.getByText('Sent. The letter has left the rack.')).toBeVisible();
    await letterTo(page.request, address, /answered/);
  });

  await test.step('the member reads the answer and the red target', async () => {
    await page.goto('/week');
    await expect(page.getByText('Sevens in red')).toBeVisible();
    await snap('answered');
    await page.goto('/session');
    await expect(page.getByText('Seven straight ones beat nine crooked ones.')).toBeVisible();
    await snap('red-target');
  });

  await test.step('three weeks on is the landing: the change is judged', async () => {
    await moveClock(page, 22);
    await expect
      .poll(
        async () => {
          await page.goto('/week');
          return page.getByRole('heading', { name: 'The fourth tread' }).count();
        },
        { timeout: 60_000, message: 'the renewal is written down' },
      )
      .toBe(1);
    await takeTestDay(page, { sitUps: '31', pushUps: '19', stairs: '131' });
    await page.goto('/marks');
    await expect(page.getByText(/better\.|No real change yet\.|Too early to say\./).first()).toBeVisible();
    await snap('marks');
  });

  await test.step('the card fails, access follows, a new card opens it again', async () => {
    await page.goto('/account/membership');
    await page.getByRole('button', { name: 'Card and invoices' }).click();
    await page.waitForURL(/\/portal\//);
    await changeCard(page, 'fails-later');
    // 46 days after joining: the month after the trial ends on day 42 to 45, and what fails is past due for a week.
    await moveClock(page, 24);
    await expect
      .poll(
        async () => {
          await page.goto('/account/membership');
          return page.getByText('did not go through').count();
        },
        { timeout: 60_000 },
      )
      .toBe(1);
    await snap('past-due');
    await letterTo(page.request, address, /did not go through/);
    await moveClock(page, 9);
    await expect
      .poll(
        async () => {
          await page.goto('/week');
          return page.getByRole('heading', { name: 'Your plan is closed' }).count();
        },
        { timeout: 60_000 },
      )
      .toBe(1);
    await snap('closed');
    await page.goto('/session');
    await expect(page).toHaveURL(/\/account\/membership/);
    // After the last failed try the plan has ended by itself, once that is written down: the way back is a plan and a
    // card that holds.
    const again = page.getByRole('link', { name: 'Choose a plan' });
    await expect
      .poll(
        async () => {
          await page.goto('/account/membership');
          return again.count();
        },
        { timeout: 60_000 },
      )
      .toBe(1);
    await again.click();
    await payWithAuthentication(page);
    await expect
      .poll(
        async () => {
          await page.goto('/account/membership');
          return page.getByText('Your plan is paid until').count();
        },
        { timeout: 60_000 },
      )
      .toBe(1);
    await snap('open-again');
  });

  await test.step('the member ends it, and it stays open as long as it is paid', async () => {
    await page.getByRole('button', { name: 'End it with the paid period' }).click();
    await expect(page.getByText('Your plan ends on')).toBeVisible();
    await snap('ending');
    await page.goto('/lessons');
    await expect(page.getByRole('heading', { name: 'Lessons' })).toBeVisible();
  });
  expect(refused).toEqual([]);
});
