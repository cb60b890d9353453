import { eq, sql } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { callAuth, hashToken } from '#server/auth/config';
import { readViewer } from '#server/auth/session';
import {
  askForLink,
  endSession,
  listSessions,
  safeNext,
  signInAsDemo,
  signOut,
  spendLink,
  type CookieJar,
} from '#server/auth/sign-in';
import { invites, sessions, users, verificationTokens } from '#server/db/schema/index';
import { addPerson } from '#support/people';
import { useApp } from '#support/test-app';

const world = useApp();
const SESSION = 'newel-session';
let networks = 0;

/** A browser: its cookies, and what it was told to keep them by. */
class Browser implements CookieJar {
  readonly kept = new Map<string, string>();
  readonly told = new Map<string, object>();
  readonly clientIp = `198.51.100.${(networks += 1)}`;
  get(name: string) {
    const value = this.kept.get(name);
    return value === undefined ? undefined : { value };
  }
  set(name: string, value: string, options: object) {
    this.kept.set(name, value);
    this.told.set(name, options);
  }
  delete(name: string) {
    this.kept.delete(name);
  }
  ask = (address: string, next = '') =>
    askForLink(world.app, this, { address, next, clientIp: this.clientIp });
  spend = (link: Link) => spendLink(world.app, this, { ...link, clientIp: this.clientIp, device: 'a test' });
  viewer = () => readViewer(world.app, this.kept.get(SESSION));
}

interface Link {
  address: string;
  secret: string;
}

/** The link of the newest letter to an address, from the queue it waits in. */
async function letterTo(address: string): Promise<Link> {
  const { rows } = await world.app.pool.query<{ path: string }>(
    `select data->'data'->>'path' as path from pgboss.job
      where name = 'mail' and data->>'address' = $1 order by created_on desc limit 1`,
    [address],
  );
  const query = new URL(rows[0]?.path ?? '/', 'http://x').searchParams;
  return { address: query.get('address') ?? '', secret: query.get('secret') ?? '' };
}

async function signedIn(address: string): Promise<Browser> {
  const browser = new Browser();
  await browser.ask(address);
  await browser.spend(await letterTo(address));
  return browser;
}

const tokensOf = (address: string) =>
  world.app.db.select().from(verificationTokens).where(eq(verificationTokens.identifier, address));
const REFUSED = { code: 'bad-request', status: 400 };

describe('asking for a link', () => {
  it('is answered alike for a known, an unknown and an impossible address', async () => {
    await addPerson(world.app, 'member', { email: 'known@skerrow.example' });
    for (const address of ['known@skerrow.example', 'unknown@skerrow.example', 'not an address']) {
      const browser = new Browser();
      expect(await browser.ask(address)).toBeUndefined();
      expect([...browser.kept.keys()]).toEqual(['newel-ask']);
      expect(browser.told.get('newel-ask')).toMatchObject({
        httpOnly: true,
        sameSite: 'lax',
        path: '/sign-in',
        maxAge: 600,
      });
    }
    expect(await world.app.db.select().from(users).where(eq(users.email, 'unknown@skerrow.example'))).toEqual(
      [],
    );
  });

  it('sends half of the secret; the table holds a hash of the whole for ten minutes', async () => {
    const browser = new Browser();
    await browser.ask('halves@skerrow.example');
    const { secret } = await letterTo('halves@skerrow.example');
    const [row] = await tokensOf('halves@skerrow.example');
    expect(secret.length).toBeGreaterThanOrEqual(32);
    expect(row?.token).toMatch(/^[0-9a-f]{64}$/);
    expect(row?.token).not.toContain(secret);
    const minutes = ((row?.expires.getTime() ?? 0) - Date.now()) / 60_000;
    expect(minutes).toBeGreaterThan(9);
    expect(minutes).toBeLessThanOrEqual(10);
  });

  it('is refused the sixth time in an hour for one address, from wherever', async () => {
    for (let time = 1; time <= 5; time += 1) await new Browser().ask('often@skerrow.example');
    await expect(new Browser().ask('Often@Skerrow.example ')).rejects.toMatchObject({
      code: 'too-many',
      status: 429,
    });
    await new Browser().ask('other@skerrow.example');
  });

  it('is refused the twenty-first time in an hour for one network', async () => {
    const browser = new Browser();
    for (let time = 1; time <= 20; time += 1) await browser.ask(`many-${time}@skerrow.example`);
    await expect(browser.ask('many-21@skerrow.example')).rejects.toMatchObject({ code: 'too-many' });
  });
});

describe('the link', () => {
  it('signs in the browser that asked, makes a visitor of somebody new and lives 90 days', async () => {
    const browser = await signedIn('new@skerrow.example');
    expect(await browser.viewer()).toMatchObject({ email: 'new@skerrow.example', role: 'visitor' });
    expect([...browser.kept.keys()]).toEqual([SESSION]);
    expect(browser.told.get(SESSION)).toMatchObject({
      httpOnly: true,
      sameSite: 'lax',
      path: '/',
      maxAge: 90 * 86_400,
    });
  });

  it('is refused in another browser, and stays good for the first', async () => {
    const browser = new Browser();
    await browser.ask('bound@skerrow.example');
    const link = await letterTo('bound@skerrow.example');
    await expect(new Browser().spend(link)).rejects.toMatchObject(REFUSED);
    const stranger = new Browser();
    await stranger.ask('stranger@skerrow.example');
    await expect(stranger.spend(link)).rejects.toMatchObject(REFUSED);
    expect(await tokensOf('bound@skerrow.example')).toHaveLength(1);
    await browser.spend(link);
    expect(await browser.viewer()).not.toBeNull();
  });

  it('is spent once', async () => {
    const browser = new Browser();
    await browser.ask('once@skerrow.example');
    const link = await letterTo('once@skerrow.example');
    const ask = browser.kept.get('newel-ask') ?? '';
    await browser.spend(link);
    browser.kept.set('newel-ask', ask);
    await expect(browser.spend(link)).rejects.toMatchObject(REFUSED);
    expect(await tokensOf('once@skerrow.example')).toEqual([]);
  });

  it('is refused after its ten minutes', async () => {
    const browser = new Browser();
    await browser.ask('late@skerrow.example');
    const link = await letterTo('late@skerrow.example');
    await world.app.db
      .update(verificationTokens)
      .set({ expires: new Date(Date.now() - 1_000) })
      .where(eq(verificationTokens.identifier, link.address));
    await expect(browser.spend(link)).rejects.toMatchObject(REFUSED);
    expect(await browser.viewer()).toBeNull();
  });

  it('opens nothing for another address or with a secret of somebody’s own', async () => {
    const browser = new Browser();
    await browser.ask('mine@skerrow.example');
    const link = await letterTo('mine@skerrow.example');
    await expect(browser.spend({ ...link, address: 'known@skerrow.example' })).rejects.toMatchObject(REFUSED);
    await expect(browser.spend({ ...link, secret: `${link.secret}x` })).rejects.toMatchObject(REFUSED);
    await browser.spend(link);
  });

  it('makes a coach of an invited address, once', async () => {
    const owner = await addPerson(world.app, 'owner');
    await world.app.db.insert(invites).values({
      email: 'Coach@skerrow.example',
      name: 'Odile Brandt',
      invitedBy: owner.id,
      createdAt: world.clock.now(),
    });
    const browser = await signedIn('coach@skerrow.example');
    expect(await browser.viewer()).toMatchObject({ role: 'coach', name: 'Odile Brandt' });
    const [spent] = await world.app.db
      .select()
      .from(invites)
      .where(eq(invites.email, 'Coach@skerrow.example'));
    expect(spent?.acceptedAt).toEqual(world.clock.now());
  });

  it('leads only to a page of ours', () => {
    expect(safeNext('/week?x=1')).toBe('/week?x=1');
    for (const next of [
      '//evil.example',
      '/\\evil.example',
      'https://evil.example',
      'javascript:alert(1)',
      '/a\nb',
      undefined,
    ])
      expect(safeNext(next)).toBe('');
  });
});

describe('sessions', () => {
  it('are kept as a hash of 256 bits of chance: reading the table signs nobody in', async () => {
    const browser = await signedIn('hashed@skerrow.example');
    const cookie = browser.kept.get(SESSION) ?? '';
    expect(Buffer.from(cookie, 'base64url')).toHaveLength(32);
    const { id = '' } = (await browser.viewer()) ?? {};
    const [row] = await world.app.db.select().from(sessions).where(eq(sessions.userId, id));
    expect(row?.sessionToken).toBe(hashToken(cookie));
    expect(await readViewer(world.app, row?.sessionToken)).toBeNull();
  });

  it('end by sign-out one at a time, for the person’s other browser stays in', async () => {
    const [phone, desk] = [await signedIn('two@skerrow.example'), await signedIn('two@skerrow.example')];
    await signOut(world.app, phone);
    expect(phone.kept.size).toBe(0);
    const viewer = await desk.viewer();
    expect(viewer).not.toBeNull();
    expect(await listSessions(world.app, viewer?.id ?? '')).toHaveLength(1);
  });

  it('can be ended by their owner and by nobody else', async () => {
    const mine = await (await signedIn('own@skerrow.example')).viewer();
    const theirs = await signedIn('theirs@skerrow.example');
    const other = await theirs.viewer();
    await endSession(world.app, mine?.id ?? '', other?.sessionId ?? '');
    expect(await theirs.viewer()).not.toBeNull();
    await endSession(world.app, other?.id ?? '', other?.sessionId ?? '');
    expect(await theirs.viewer()).toBeNull();
  });

  it('end with their time, and for somebody who was shut out', async () => {
    const browser = await signedIn('ends@skerrow.example');
    const { id = '' } = (await browser.viewer()) ?? {};
    await world.app.db.update(users).set({ disabledAt: world.clock.now() }).where(eq(users.id, id));
    expect(await browser.viewer()).toBeNull();
    await world.app.db.update(users).set({ disabledAt: null }).where(eq(users.id, id));
    await world.app.db.update(sessions).set({ expires: world.clock.now() }).where(eq(sessions.userId, id));
    expect(await browser.viewer()).toBeNull();
  });

  it('move on by use, once a day at most', async () => {
    const browser = await signedIn('moves@skerrow.example');
    const expires = async () =>
      (
        await world.app.db
          .select()
          .from(sessions)
          .where(eq(sessions.sessionToken, hashToken(browser.kept.get(SESSION) ?? '')))
      )[0]?.expires;
    const before = await expires();
    await browser.viewer();
    expect(await expires()).toEqual(before);
    world.clock.moveDays(2);
    await browser.viewer();
    expect(await expires()).toEqual(new Date((before?.getTime() ?? 0) + 2 * 86_400_000));
  });
});

describe('doors that are not there', () => {
  it('nobody chooses a name in production', async () => {
    const person = await addPerson(world.app, 'member');
    const production = { ...world.app, env: { ...world.app.env, demo: false } };
    const browser = new Browser();
    await expect(signInAsDemo(production, browser, person.id, '')).rejects.toMatchObject({
      code: 'not-found',
    });
    expect(browser.kept.size).toBe(0);
    expect(await world.app.db.$count(sessions, sql`${sessions.userId} = ${person.id}`)).toBe(1);
  });

  it('a link without the other half of its secret opens nothing at the library itself', async () => {
    const browser = new Browser();
    await browser.ask('direct@skerrow.example');
    const { secret, address } = await letterTo('direct@skerrow.example');
    const query = new URLSearchParams({ token: secret, email: address, callbackUrl: '/' });
    const reply = await callAuth(world.app, `callback/email?${query.toString()}`, { method: 'GET' });
    expect(reply.headers.getSetCookie().join()).not.toContain(SESSION);
  });
});
