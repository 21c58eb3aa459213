import { describe, expect, it } from 'vitest';
import {
  axeFindings,
  expectNoFaults,
  browserOfThisFile,
  openDesk,
  picture,
  signIn,
  type Desk,
  type PaletteName,
} from '../support/browser';
import { testAddress } from '../support/stack';
import { pagesOfTheProduct, visits } from './page-visits';

const browser = browserOfThisFile();

const readers = [...new Set(Object.values(visits).map(({ email }) => email))];

async function look(desk: Desk, address: string, name: string): Promise<void> {
  await desk.page.goto(`${testAddress()}${address}`, { waitUntil: 'networkidle' });
  await desk.page.getByRole('heading', { level: 1 }).first().waitFor();
  expect([address, await axeFindings(desk.page)]).toEqual([address, []]);
  expect(await desk.page.title()).toMatch(/.+ · Ringtrue$/);
  // A page wider than the screen hides what a gloved hand will not scroll to.
  const overflow = await desk.page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
  expect([address, 'wider than the screen by', Math.max(0, overflow)]).toEqual([address, 'wider than the screen by', 0]);
  await picture(desk.page, name);
}

describe('every page', () => {
  it('is visited here', () => {
    expect(Object.keys(visits).sort()).toEqual(pagesOfTheProduct());
  });

  describe.each(['floor', 'reading-room', 'booth'] as const satisfies readonly PaletteName[])('in the %s palette', (palette) => {
    it.each(readers)('has nothing that axe finds, for %s', { timeout: 180_000 }, async (email) => {
      const desk = await openDesk(browser.open(), { palette });
      if (email !== null) await signIn(desk, email);
      for (const [pattern, visit] of Object.entries(visits).filter(([, one]) => one.email === email)) {
        const addresses = visit.find === undefined ? [pattern] : await visit.find(desk.page);
        expect([pattern, addresses.length]).not.toEqual([pattern, 0]);
        for (const [place, address] of addresses.entries())
          await look(desk, address, `${palette}${pattern.replaceAll(/[/[\]]+/g, '-')}${String(place)}`);
      }
      expectNoFaults(desk);
      await desk.context.close();
    });
  });
});

describe('who may see what', () => {
  it('leads a stranger to sign-in, and back to what was asked for', async () => {
    const stranger = await openDesk(browser.open());
    await stranger.page.goto(`${testAddress()}/parts?serial=T104`);
    await stranger.page.waitForURL(/\/sign-in\?next=%2Fparts%3Fserial%3DT104$/);
    await stranger.page.getByLabel('E-mail').fill('inspector@aldermoor.example');
    await stranger.page.getByLabel('Password').first().fill('sound-castings-ring-true');
    await stranger.page.getByRole('button', { name: 'Sign in' }).click();
    await stranger.page.waitForURL(/\/parts\?serial=T104$/);
    await stranger.context.close();
  });

  it('hides what is not for a role, and says so in words', async () => {
    const customer = await openDesk(browser.open());
    await signIn(customer, 'quality@tarnside.example');
    for (const address of ['/parts', '/no-such-page']) {
      const answer = await customer.page.goto(`${testAddress()}${address}`);
      expect(answer?.status()).toBe(404);
      await customer.page.getByRole('heading', { level: 1, name: 'There is nothing here' }).waitFor();
    }
    await customer.context.close();
  });

  it('speaks French where the browser asks for it', async () => {
    const desk = await openDesk(browser.open(), { locale: 'fr' });
    await desk.page.goto(`${testAddress()}/sign-in`);
    await desk.page.getByRole('button', { name: 'Se connecter' }).waitFor();
    expect(await desk.page.locator('html').getAttribute('lang')).toBe('fr');
    await desk.context.close();
  });
});
