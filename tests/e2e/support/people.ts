import { expect, type APIRequestContext, type Page } from '@playwright/test';

const INBOX = process.env['E2E_INBOX'] ?? 'http://127.0.0.1:4324';

interface Mail {
  subject: string;
  links: string[];
}

/** Signs in as one of the demo's people by name. */
export async function signInAs(page: Page, name: string): Promise<void> {
  await page.goto('/sign-in');
  await page.getByRole('button', { name, exact: true }).click();
  await expect(page).not.toHaveURL(/sign-in/);
}

/** The newest letter to an address whose subject fits, once it has come. */
export async function letterTo(request: APIRequestContext, address: string, subject: RegExp): Promise<Mail> {
  let found: Mail | undefined;
  await expect
    .poll(
      async () => {
        const reply = await request.get(`${INBOX}/api/mails?to=${encodeURIComponent(address)}`);
        const { mails } = (await reply.json()) as { mails: Mail[] };
        found = mails.find((mail) => subject.test(mail.subject));
        return found !== undefined;
      },
      { timeout: 20_000, message: `a letter to ${address}` },
    )
    .toBe(true);
  return found as Mail;
}

/** Moves the practice's clock on. */
export async function moveClock(page: Page, days: number): Promise<void> {
  await page.goto('/demo');
  await page.getByLabel('Or a number of days').fill(String(days));
  await page.getByRole('button', { name: 'Move the clock' }).click();
  await expect(page.getByRole('status')).toContainText('Moved');
}

/** An island says when it listens. */
export const ready = (page: Page) => expect(page.locator('[data-ready]').first()).toBeVisible();

/** Chooses a rail by the words of its question and its own. */
export async function choose(page: Page, question: string | RegExp, answer: string | RegExp): Promise<void> {
  const group = page.getByRole('group', { name: question });
  const wanted = { name: answer, exact: typeof answer === 'string' };
  await group.getByRole('radio', wanted).or(group.getByRole('checkbox', wanted)).first().check();
}
