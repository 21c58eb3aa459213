import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { browserOfThisFile, demoPassword } from '../support/browser';
import { testAddress } from '../support/stack';
import { inspect } from './bench-steps';

const browser = browserOfThisFile();

const savedWords = (page: Page) => page.locator('[data-saved]').textContent();

describe('the bench keeps what was entered', () => {
  it('when the session ends under the person’s hands, until they have signed in again', { timeout: 90_000 }, async () => {
    const { page, context } = await browser.desk('inspector2@aldermoor.example');
    await inspect(page, 'T10423', 'Ultrasonic wall thickness');
    // As `sign out everywhere` on another machine does it.
    expect((await page.request.delete(`${testAddress()}/api/session`)).status()).toBe(204);
    await page.getByLabel('Reading 23').fill('0.907');
    await expect.poll(() => savedWords(page)).toMatch(/^Not saved: your session has ended/);
    const [beside] = await Promise.all([
      context.waitForEvent('page'),
      page.getByRole('link', { name: 'Sign in beside this page' }).click(),
    ]);
    await beside.getByLabel('E-mail').fill('inspector2@aldermoor.example');
    await beside.getByLabel('Password').first().fill(demoPassword);
    await beside.getByRole('button', { name: 'Sign in' }).click();
    await beside.waitForURL(({ pathname }) => pathname === '/account');
    await beside.close();
    await page.evaluate(() => window.dispatchEvent(new Event('focus')));
    await expect.poll(() => savedWords(page), { timeout: 40_000 }).toBe('Saved');
    await page.reload();
    await expect.poll(() => page.getByLabel('Reading 23').inputValue()).toBe('0.907');
    await context.close();
  });

  it('when two tabs write: the later one sees both and chooses', { timeout: 90_000 }, async () => {
    const { page, context } = await browser.desk('inspector@aldermoor.example');
    await inspect(page, 'T10424', 'Ultrasonic wall thickness');
    const second = await context.newPage();
    await second.goto(page.url());
    await second.getByLabel('Reading 22').fill('0.905');
    await expect.poll(() => savedWords(second)).toBe('Saved');
    await page.getByLabel('Reading 22').fill('0.899');
    const choice = page.getByRole('dialog');
    await choice.waitFor();
    expect(await choice.getByRole('row', { name: /22/ }).textContent()).toMatch(/0\.899.*0\.905/);
    expect(await second.getByLabel('Reading 22').inputValue()).toBe('0.905');
    await choice.getByRole('button', { name: 'Keep mine' }).click();
    await expect.poll(() => savedWords(page)).toBe('Saved');
    await page.reload();
    await expect.poll(() => page.getByLabel('Reading 22').inputValue()).toBe('0.899');
    await context.close();
  });

  it('when the button is pressed twice: one signature', { timeout: 90_000 }, async () => {
    const { page, context } = await browser.desk('inspector2@aldermoor.example');
    const signatures: number[] = [];
    page.on('response', (answer) => {
      if (answer.url().endsWith('/signature')) signatures.push(answer.status());
    });
    await inspect(page, 'T10424', 'Visual after cut-off');
    await page.getByRole('group', { name: /^40/ }).getByRole('radio', { name: 'conforming', exact: true }).check();
    await page.getByRole('checkbox', { name: /^Evaluated/ }).check();
    await page.getByLabel('Every view this operation asks for was examined.').check();
    await expect.poll(() => savedWords(page), { timeout: 30_000 }).toBe('Saved');
    await page.getByRole('button', { name: 'Sign', exact: true }).click();
    await page.getByLabel('Password or PIN').fill(demoPassword);
    await page.getByRole('button', { name: 'Sign now' }).dblclick();
    await page
      .getByText(/^Signed as I-/)
      .first()
      .waitFor();
    expect(signatures).toEqual([201]);
    await context.close();
  });
});
