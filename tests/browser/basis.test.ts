import type { Browser, Page } from 'playwright-core';
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

/** A gloved finger needs 48 px; the height of a button as drawn. */
async function heightOf(page: Page, name: string): Promise<number> {
  return (await page.getByRole('dialog').getByRole('button', { name, exact: true }).boundingBox())?.height ?? 0;
}

describe('what must be valid for an inspection to count', () => {
  it('an inspector records a check with one hand, and is told at once when it has failed', async () => {
    const desk = await openDesk(browser, { palette: 'booth' });
    const { page } = desk;
    await signIn(desk, 'inspector@aldermoor.example');
    await page.getByRole('link', { name: 'Process checks' }).first().click();
    // What stops work stands first.
    await page.getByText('Failed: scope stopped').first().waitFor();
    await page.getByRole('button', { name: 'Record UV-A irradiance at the part, booth 3' }).click();
    await page.getByRole('note', { name: 'UV-A and penetrant' }).waitFor();
    const value = page.getByLabel('Value read');
    await value.fill('940');
    await page.getByText('Outside its window: this check has failed.').waitFor();
    expect(await page.getByRole('button', { name: 'Good', exact: true }).isDisabled()).toBe(true);
    await value.fill('1740,5');
    await page.getByText('Inside its window.').waitFor();
    expect(Math.min(await heightOf(page, 'Good'), await heightOf(page, 'Failed'))).toBeGreaterThanOrEqual(48);
    await page.getByRole('button', { name: 'Good', exact: true }).click();
    await page.getByText(/^Recorded as good; booth 3 counts until \d{4}-\d{2}-\d{2}/).waitFor();
    await page.getByText('1740.5 µW/cm²').first().waitFor();
    await picture(page, 'basis-check-recorded');
    expectNoFaults(desk);
    await desk.context.close();
  });

  it('an administrator records a gauge found out of tolerance, and a level 3 decides on what leaned on it', async () => {
    const desk = await openDesk(browser);
    const { page } = desk;
    await signIn(desk, 'administrator@aldermoor.example');
    await page.goto(`${testAddress()}/equipment`, { waitUntil: 'networkidle' });
    await page.getByText('Lapsed: not to be used').first().waitFor();
    await page.getByLabel('Number begins with').fill('UT-04');
    await page.waitForURL(/number=UT-04/);
    await page.getByRole('link', { name: 'UT-04' }).click();
    const newest = page.getByRole('row').filter({ hasText: 'counts now' });
    const day = (await newest.locator('time').first().getAttribute('datetime')) ?? '';
    await page.getByRole('button', { name: 'Record a calibration' }).click();
    const form = page.getByRole('dialog');
    await form.getByLabel('As found', { exact: true }).selectOption('failed');
    await form.getByText('This holds parts').waitFor();
    await form.getByLabel('As left', { exact: true }).selectOption('good');
    await form.getByLabel(/^Bias found/).fill('0,028');
    await form.getByLabel('Calibrated on').fill(day);
    await form.getByLabel('Due on').fill(`${String(Number(day.slice(0, 4)) + 1)}${day.slice(4, 8)}01`);
    await form.getByRole('button', { name: 'Record', exact: true }).click();
    await page.getByText(/^Recorded\. Suspect list Q-\d{4}-\d{5}: 4 inspections, 3 parts held, 1 part has gone\.$/).waitFor();
    await page.getByRole('link', { name: 'Open the suspect list' }).click();
    await page.getByRole('heading', { name: 'Inspections that leaned on it' }).waitFor();
    await page.getByText('reading 0.028 mm wrong').first().waitFor();
    const rows = page.getByRole('table').getByRole('row');
    await rows.filter({ hasText: 'G30101' }).getByRole('link', { name: /^C-/ }).waitFor();
    expect(await rows.filter({ hasText: 'Held' }).count()).toBe(4);
    // An administrator cannot decide.
    expect(await page.getByRole('button', { name: /^Decide on/ }).count()).toBe(0);
    await picture(page, 'basis-suspect-list');
    const address = page.url();
    expectNoFaults(desk);
    await desk.context.close();

    const judge = await openDesk(browser);
    await signIn(judge, 'reviewer@aldermoor.example');
    await judge.page.goto(address, { waitUntil: 'networkidle' });
    await judge.page.getByRole('button', { name: /^Decide on AM-2210, 110, In the plant/ }).click();
    const decision = judge.page.getByRole('dialog');
    await decision.getByLabel('Decision').selectOption('no-effect');
    await decision.getByText('I state that this failure had no effect').waitFor();
    await decision.getByLabel('Reason').fill('The bias is a tenth of the nearest reading to its limit.');
    await decision.getByLabel('Password').fill('sound-castings-ring-true');
    await decision.getByRole('button', { name: 'Sign' }).click();
    await judge.page.getByText('The bias is a tenth of the nearest reading to its limit.').waitFor();
    await judge.page.getByText('No effect', { exact: true }).waitFor();
    expectNoFaults(judge);
    await judge.context.close();
  });

  it('a reviewer writes the next issue of a technique, and cannot check it themselves', async () => {
    const desk = await openDesk(browser);
    const { page } = desk;
    await signIn(desk, 'reviewer@aldermoor.example');
    await page.goto(`${testAddress()}/techniques?method=visual`, { waitUntil: 'networkidle' });
    await page.getByRole('link', { name: 'VI-010 issue 1' }).click();
    await page.getByRole('button', { name: 'Write the next issue' }).click();
    await page.getByRole('button', { name: 'Add a row to Process windows' }).click();
    await page.getByLabel('Process windows 1: Process value').fill('White light');
    await page.getByLabel('Process windows 1: Unit').fill('lx');
    await page.getByLabel('Process windows 1: From').fill('1000,0');
    await page.getByRole('button', { name: 'Save the draft' }).click();
    await page.getByText('issue 2', { exact: true }).waitFor();
    await page.getByRole('cell', { name: '1000.0 … lx' }).waitFor();
    expect(await page.getByRole('button', { name: 'I have checked it' }).count()).toBe(0);
    await page.getByRole('button', { name: 'Change the draft' }).waitFor();
    expectNoFaults(desk);
    await desk.context.close();
  });
});

describe.each(['floor', 'reading-room', 'booth'] as const satisfies readonly PaletteName[])('in the %s palette', (palette) => {
  it('axe finds nothing on lists, single ones and open forms', async () => {
    const desk = await openDesk(browser, { palette });
    const { page } = desk;
    await signIn(desk, 'reviewer@aldermoor.example');
    const visits: readonly { path: string; link: RegExp | null; ready: string; button: RegExp | null }[] = [
      { path: '/techniques?method=penetrant', link: /^FP-210/, ready: 'Process windows', button: /^Write the next issue/ },
      { path: '/equipment?number=UT-', link: /^UT-04/, ready: 'Calibrations', button: /^Record a calibration/ },
      { path: '/process-checks', link: null, ready: 'How they stand now', button: /^Record Known-defect panel/ },
      { path: '/suspects', link: /^Q-/, ready: 'Groups', button: /^Decide on/ },
    ];
    for (const { path, link, ready, button } of visits) {
      await page.goto(`${testAddress()}${path}`, { waitUntil: 'networkidle' });
      await page.getByRole('heading', { level: 1 }).waitFor();
      expect([path, await axeFindings(page)]).toEqual([path, []]);
      await picture(page, `${palette}${path.replaceAll(/\W/g, '-')}`);
      if (link) await page.getByRole('link', { name: link }).first().click();
      await page.getByRole('heading', { name: ready }).waitFor();
      await page.waitForLoadState('networkidle');
      expect([`${path} one`, await axeFindings(page)]).toEqual([`${path} one`, []]);
      await picture(page, `${palette}${path.replaceAll(/\W/g, '-')}-one`);
      if (button) await page.getByRole('button', { name: button }).first().click();
      await page.getByRole('dialog').getByRole('heading').waitFor();
      expect([`${path} form`, await axeFindings(page)]).toEqual([`${path} form`, []]);
      await picture(page, `${palette}${path.replaceAll(/\W/g, '-')}-form`);
    }
    expectNoFaults(desk);
    await desk.context.close();
  });
});
