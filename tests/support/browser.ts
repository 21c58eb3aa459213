import { mkdirSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import axe from 'axe-core';
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';
import { afterAll, beforeAll, expect } from 'vitest';
import { testAddress } from './stack';

export const demoPassword = 'sound-castings-ring-true';

/** Debian's Chromium, headless, talking to nobody but the product. */
export function openBrowser(): Promise<Browser> {
  return chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: [
      '--headless',
      '--no-sandbox',
      '--disable-gpu',
      '--disable-quic',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
    ],
  });
}

export type PaletteName = 'floor' | 'reading-room' | 'booth';

/** One browser for the tests of a file; closed after the last of them. `desk` signs a person in at a place of their own. */
export function browserOfThisFile(): { readonly open: () => Browser; readonly desk: (email: string) => Promise<Desk> } {
  let browser: Browser | undefined;
  beforeAll(async () => {
    browser = await openBrowser();
  });
  afterAll(async () => {
    await browser?.close();
  });
  const open = () => {
    if (!browser) throw new Error('the browser is open while tests run');
    return browser;
  };
  const desk = async (email: string) => {
    const made = await openDesk(open());
    await signIn(made, email);
    return made;
  };
  return { open, desk };
}

/** A browser of its own for one person: signed in through the page, with faults of the page's scripts collected. */
export interface Desk {
  readonly context: BrowserContext;
  readonly page: Page;
  /** Uncaught errors and console errors of the page. */
  readonly faults: string[];
}

export async function openDesk(
  browser: Browser,
  options: { readonly palette?: PaletteName; readonly locale?: 'en' | 'fr' } = {},
): Promise<Desk> {
  const context = await browser.newContext({
    viewport: { width: 1280, height: 800 },
    acceptDownloads: true,
    locale: options.locale === 'fr' ? 'fr-FR' : 'en-GB',
  });
  const { hostname } = new URL(testAddress());
  const cookie = (name: string, value: string) => ({ name, value, domain: hostname, path: '/' });
  await context.addCookies([
    cookie('ringtrue-palette', options.palette ?? 'floor'),
    cookie('ringtrue-locale', options.locale ?? 'en'),
  ]);
  const page = await context.newPage();
  const faults: string[] = [];
  page.on('pageerror', (error) => faults.push(`page error: ${error.message}`));
  page.on('console', (message) => {
    // Refusals are part of the journeys: a 4xx answer is no fault of the page.
    if (message.type() === 'error' && !/status of 4\d\d/.test(message.text())) faults.push(`console: ${message.text()}`);
  });
  return { context, page, faults };
}

/** Signs in through the page and waits for what the person sees first. */
export async function signIn(desk: Desk, email: string, password = demoPassword): Promise<void> {
  await desk.page.goto(`${testAddress()}/sign-in`);
  await desk.page.getByLabel(/e-?mail/i).fill(email);
  await desk.page
    .getByLabel(/password|mot de passe/i)
    .first()
    .fill(password);
  await desk.page.getByRole('button', { name: /^(sign in|se connecter)$/i }).click();
  await desk.page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
}

/** What axe finds against WCAG 2.2 A and AA on the page as it stands. */
export async function axeFindings(page: Page): Promise<string[]> {
  await page.evaluate(axe.source);
  return page.evaluate(async () => {
    type Found = { violations: { id: string; nodes: { target: unknown[]; failureSummary?: string }[] }[] };
    const { run } = (window as unknown as { axe: { run: (options: object) => Promise<Found> } }).axe;
    const { violations } = await run({ runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'] });
    const line = (id: string, target: unknown[], summary = '') =>
      `${id} at ${JSON.stringify(target)}: ${summary.replaceAll('\n', ' ')}`;
    return violations.flatMap(({ id, nodes }) =>
      nodes.slice(0, 3).map(({ target, failureSummary }) => line(id, target, failureSummary)),
    );
  });
}

/** Fails when the page's scripts complained; a call that the test itself cut off is no complaint. */
export function expectNoFaults(desk: Desk, { cut = false } = {}): void {
  expect(desk.faults.filter((fault) => !cut || !fault.includes('net::ERR_FAILED'))).toEqual([]);
}

/** Keeps a picture of the page where a person can look at it when RINGTRUE_PICTURES names a folder. */
export async function picture(page: Page, name: string): Promise<void> {
  const folder = process.env.RINGTRUE_PICTURES;
  if (!folder) return;
  mkdirSync(folder, { recursive: true });
  await page.screenshot({ path: path.join(folder, `${name}.png`) });
}

/** A folder for downloads and files to check, removed with `remove`. */
export function scratch(): { readonly folder: string; readonly remove: () => void } {
  const folder = mkdtempSync(path.join(tmpdir(), 'ringtrue-test-'));
  return { folder, remove: () => rmSync(folder, { recursive: true, force: true }) };
}
