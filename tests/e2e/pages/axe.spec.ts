import { expect, test, type Page } from '@playwright/test';
import { expectNoFindings } from '../support/axe.ts';
import { signInAs } from '../support/people.ts';

/** Every page of ours that can be opened as it is, by who opens it. The story looks at the others on its way. */
const PAGES: Record<string, readonly string[]> = {
  visitor: [
    '/',
    '/plans',
    '/tests',
    '/cautions',
    '/methods',
    '/lessons',
    '/privacy',
    '/terms',
    '/sign-in',
    '/sign-in/sent',
    '/sign-in/confirm',
    '/join',
    '/goodbye',
    '/demo',
    '/unsubscribe',
    '/nowhere',
  ],
  'Edda Rooke': [
    '/week',
    '/flight',
    '/session',
    '/test-day',
    '/test-day/push-ups',
    '/test-day/stairs',
    '/marks',
    '/marks/new?test=push-ups',
    '/check-in',
    '/lessons',
    '/house',
    '/house/card',
    '/readiness',
    '/stop',
    '/account',
    '/account/membership',
    '/account/sessions',
    '/account/records',
  ],
  'Magnus Pell': ['/held', '/account/membership'],
  'Casper Dunn': ['/week', '/account/membership', '/session/done'],
  'Mira Solberg': ['/week', '/test-day', '/marks', '/flight'],
  'Odile Brandt': ['/desk', '/caseload', '/account'],
  'Ines Tarrant': ['/practice', '/practice/people', '/practice/plans', '/practice/money', '/practice/audit'],
};
const WIDTHS = [1440, 390];

/** The first link of a kind on a page, so that one of each generated page is seen too. */
const firstLink = (page: Page, path: string) =>
  page.locator(`main a[href^="${path}"]`).first().getAttribute('href');

for (const [person, paths] of Object.entries(PAGES)) {
  test(`axe finds nothing on the pages of ${person}`, async ({ page }) => {
    test.setTimeout(600_000);
    if (person !== 'visitor') await signInAs(page, person);
    const all = [...paths];
    const seeds =
      person === 'visitor' ? ['/lessons', '/methods'] : person === 'Odile Brandt' ? ['/desk'] : [];
    for (const seed of seeds) {
      await page.goto(seed);
      const found = await firstLink(page, `${seed}/`);
      expect(found, `a link under ${seed}`).not.toBeNull();
      all.push(found ?? seed);
    }
    for (const path of all) {
      for (const width of WIDTHS) {
        await page.setViewportSize({ width, height: 900 });
        await page.goto(path);
        await expectNoFindings(page, path);
      }
    }
  });
}
