import type { Page } from '@playwright/test';

export interface Traffic {
  /** Bytes on the wire, headers too, of everything the page asked for. */
  allBytes: number;
  /** Scripts alone, compressed, without their headers. */
  scriptBytes: number;
  /** Hosts other than the page's own. */
  strangers: string[];
}

/**
 * Opens a page with an empty cache and weighs what came over the wire, as compressed as the server sent it.
 * @param settle what has to be there before the page counts as whole
 */
export async function weigh(
  page: Page,
  path: string,
  settle: (page: Page) => Promise<unknown> = () => Promise.resolve(),
): Promise<Traffic> {
  const devtools = await page.context().newCDPSession(page);
  await devtools.send('Network.enable');
  await devtools.send('Network.clearBrowserCache');
  const kinds = new Map<string, string>();
  const heads = new Map<string, number>();
  const sizes = new Map<string, number>();
  const hosts = new Set<string>();
  devtools.on('Network.requestWillBeSent', ({ requestId, type, request }) => {
    kinds.set(requestId, type ?? 'Other');
    if (/^https?:/.test(request.url)) hosts.add(new URL(request.url).host);
  });
  devtools.on('Network.responseReceived', ({ requestId, type, response }) => {
    kinds.set(requestId, type);
    heads.set(requestId, response.encodedDataLength);
  });
  devtools.on('Network.loadingFinished', ({ requestId, encodedDataLength }) =>
    sizes.set(requestId, encodedDataLength),
  );
  await page.goto(path, { waitUntil: 'networkidle' });
  await settle(page);
  await devtools.detach();
  hosts.delete(new URL(page.url()).host);
  const whole = [...sizes.values()].reduce((sum, size) => sum + size, 0);
  const scripts = [...sizes].filter(([id]) => kinds.get(id) === 'Script');
  return {
    allBytes: whole,
    scriptBytes: scripts.reduce((sum, [id, size]) => sum + size - (heads.get(id) ?? 0), 0),
    strangers: [...hosts],
  };
}

/** Collects what the content policy refused, as the browser reports it, on every page this one opens. */
export async function listenForRefusals(page: Page): Promise<string[]> {
  const refused: string[] = [];
  page.on('console', (message) => {
    if (/content security policy/i.test(message.text())) refused.push(`${page.url()} ${message.text()}`);
  });
  await page.exposeFunction('tellRefusal', (words: string) => refused.push(words));
  await page.addInitScript(() => {
    addEventListener('securitypolicyviolation', (event) => {
      const tell = (window as unknown as { tellRefusal: (words: string) => void }).tellRefusal;
      tell(`${location.href} ${event.effectiveDirective} ${event.blockedURI}`);
    });
  });
  return refused;
}
