import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { axeFindings, expectNoFaults, openBrowser, openDesk, picture, signIn, type PaletteName } from '../support/browser';
import { testAddress } from '../support/stack';

let browser: Browser;

beforeAll(async () => {
  browser = await openBrowser();
});

afterAll(async () => {
  await browser.close();
});

const visits: readonly { readonly email: string | null; readonly paths: readonly string[] }[] = [
  { email: null, paths: ['/sign-in', '/verify'] },
  { email: 'inspector@aldermoor.example', paths: ['/', '/parts', '/trace'] },
  { email: 'reviewer@aldermoor.example', paths: ['/review', '/shipments'] },
  { email: 'quality@tarnside.example', paths: ['/', '/certificates'] },
];

/** From a list to the first thing in it: the pages of one part, finding, shipment and certificate. */
const details: readonly { readonly email: string; readonly list: string; readonly link: RegExp; readonly ready: string }[] = [
  { email: 'reviewer@aldermoor.example', list: '/review', link: /^F-/, ready: 'Decisions' },
  { email: 'reviewer@aldermoor.example', list: '/shipments', link: /^S-/, ready: 'Release gates' },
  { email: 'quality@tarnside.example', list: '/certificates', link: /^C-/, ready: 'Serials' },
];

describe.each(['floor', 'reading-room', 'booth'] as const satisfies readonly PaletteName[])('in the %s palette', (palette) => {
  it.each(visits)('axe finds nothing on $paths', { timeout: 90_000 }, async ({ email, paths }) => {
    const desk = await openDesk(browser, { palette });
    if (email !== null) await signIn(desk, email);
    for (const path of paths) {
      await desk.page.goto(`${testAddress()}${path}`, { waitUntil: 'networkidle' });
      await desk.page.getByRole('heading', { level: 1 }).waitFor();
      expect([path, await axeFindings(desk.page)]).toEqual([path, []]);
      await picture(desk.page, `${palette}${path.replaceAll('/', '-')}`);
    }
    expectNoFaults(desk);
    await desk.context.close();
  });

  it.each(details)('axe finds nothing on what $list leads to', { timeout: 90_000 }, async ({ email, list, link, ready }) => {
    const desk = await openDesk(browser, { palette });
    await signIn(desk, email);
    await desk.page.goto(`${testAddress()}${list}`, { waitUntil: 'networkidle' });
    await desk.page.getByRole('link', { name: link }).first().click();
    await desk.page.getByRole('heading', { name: ready }).waitFor();
    expect(await axeFindings(desk.page)).toEqual([]);
    await picture(desk.page, `${palette}${list.replaceAll('/', '-')}-one`);
    await desk.context.close();
  });
});

describe('who may see what', () => {
  it('leads a stranger to sign-in and hides what is not for a role', async () => {
    const stranger = await openDesk(browser);
    await stranger.page.goto(`${testAddress()}/parts`);
    await stranger.page.waitForURL(/\/sign-in/);
    const customer = await openDesk(browser);
    await signIn(customer, 'quality@tarnside.example');
    const answer = await customer.page.goto(`${testAddress()}/parts`);
    expect(answer?.status()).toBe(404);
  });

  it('speaks French where the browser asks for it', async () => {
    const desk = await openDesk(browser, { locale: 'fr' });
    await desk.page.goto(`${testAddress()}/sign-in`);
    await desk.page.getByRole('button', { name: 'Se connecter' }).waitFor();
    expect(await desk.page.locator('html').getAttribute('lang')).toBe('fr');
  });
});
