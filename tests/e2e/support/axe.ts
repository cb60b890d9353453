import AxeBuilder from '@axe-core/playwright';
import { expect, type Page } from '@playwright/test';

const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'];
/** What the lamp changes: colours, and nothing else on the page. */
const COLOURS = ['color-contrast', 'link-in-text-block'];

interface Finding {
  rule: string;
  where: string;
  why: string;
}

async function findings(page: Page, lamp: 'off' | 'on'): Promise<Finding[]> {
  // No page of ours holds a frame; this spares a second tab for each look.
  const axe = new AxeBuilder({ page }).setLegacyMode();
  const { violations } = await (lamp === 'off' ? axe.withTags(TAGS) : axe.withRules(COLOURS)).analyze();
  return violations.flatMap(({ id, nodes }) =>
    nodes.map((node) => ({
      rule: id,
      where: `${node.target.join(' ')} ${node.html.slice(0, 120)}`,
      why: (node.failureSummary ?? '').replace(/\s+/g, ' ').slice(0, 240),
    })),
  );
}

/**
 * No finding in the day's light and with the lamp lit. The window is as high as the page meanwhile, so that nothing sticky
 * lies over what is measured; drawings stand still, so that no colour is caught half faded in.
 */
export async function expectNoFindings(page: Page, name = new URL(page.url()).pathname): Promise<void> {
  const size = page.viewportSize() ?? { width: 1440, height: 900 };
  await page.emulateMedia({ reducedMotion: 'reduce' });
  const height = await page.evaluate(() => document.documentElement.scrollHeight);
  await page.setViewportSize({ width: size.width, height: Math.max(size.height, height) });
  const before = await page.evaluate(() => document.documentElement.dataset['lamp']);
  for (const lamp of ['off', 'on'] as const) {
    await page.evaluate((state) => document.documentElement.setAttribute('data-lamp', state), lamp);
    expect.soft(await findings(page, lamp), `${name}, ${size.width} wide, lamp ${lamp}`).toEqual([]);
  }
  await page.evaluate((state) => document.documentElement.setAttribute('data-lamp', state ?? 'off'), before);
  await page.setViewportSize(size);
  await page.emulateMedia({ reducedMotion: null });
}
