import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { browserOfThisFile, demoPassword, expectNoFaults, picture } from '../support/browser';
import { testAddress } from '../support/stack';

const browser = browserOfThisFile();

/** Presses the drawing of the first view at parts of its width and height. */
async function pressView(page: Page, places: readonly (readonly [number, number])[]): Promise<void> {
  const drawing = page.getByRole('group', { name: /^Zones on / }).first();
  await drawing.scrollIntoViewIfNeeded();
  const box = await drawing.boundingBox();
  if (!box) throw new Error('the view is not drawn');
  for (const [across, down] of places) await page.mouse.click(box.x + box.width * across, box.y + box.height * down);
}

interface Kept {
  readonly state: string;
  readonly criteria: { readonly zones: readonly { readonly id: string; readonly polygon: readonly [number, number][] }[] };
}

describe('a plan issue', () => {
  it('is read off a drawing, checked by a second person, approved, and then stands', { timeout: 180_000 }, async () => {
    const administrator = await browser.desk('administrator@aldermoor.example');
    const { page } = administrator;
    await page.goto(`${testAddress()}/drawings`);
    await page.getByRole('link', { name: 'AM-3175 B, issue 1' }).click();
    await page.getByText('This issue is approved and never changes.').waitFor();
    await page.getByRole('button', { name: 'Start the next issue from this one' }).click();
    await page.getByText('You prepared this issue.').waitFor();
    const address = page.url();

    // A guard band that leaves no zone is named at its field while it is typed, and leads there.
    await page.getByLabel('Largest U 21').fill('0,20');
    await page.getByRole('button', { name: /uncertaintyMax the guard bands leave no acceptance zone/ }).click();
    expect(await page.evaluate(() => document.activeElement?.getAttribute('data-path'))).toBe(
      'criteria.characteristics.0.uncertaintyMax',
    );
    await page.getByLabel('Largest U 21').fill('0.02');
    await page.getByText('Nothing stands against checking this issue.').waitFor();

    await page.getByRole('tab', { name: 'Views and zones' }).click();
    await page.getByRole('button', { name: 'Add zone' }).first().click();
    await page.getByLabel('Letter of the zone').first().fill('X');
    await pressView(page, [
      [0.4, 0.4],
      [0.6, 0.4],
      [0.5, 0.6],
    ]);
    // One corner by the keyboard: right by a millimetre.
    await page
      .getByRole('button', { name: /^Corner 3 at / })
      .first()
      .press('Shift+ArrowRight');
    await picture(page, 'plan-zone');

    await page.getByRole('tab', { name: 'Try out' }).click();
    await page.getByLabel('Reading 21, mm').fill('0,70');
    await page.getByLabel('U of 21 (k = 2)').fill('0.02');
    await page.getByRole('status').getByText('Reject').first().waitFor();
    await page.getByRole('button', { name: 'Save draft' }).click();
    await page.locator('[data-saved="saved"]').waitFor();
    await page.reload();
    await page.getByRole('tab', { name: 'Differences' }).click();
    await page.getByRole('row', { name: /criteria\.characteristics\.21\.uncertaintyMax 0\.03 0\.02/ }).waitFor();

    const checker = await browser.desk('reviewer@aldermoor.example');
    await checker.page.goto(address);
    await checker.page.getByRole('button', { name: 'State as checked' }).click();
    await checker.page.getByRole('dialog').getByRole('button', { name: 'State as checked' }).click();
    const approver = await browser.desk('signatory@aldermoor.example');
    await approver.page.goto(address);
    await approver.page.getByRole('button', { name: 'Approve' }).click();
    await approver.page.getByLabel('Password').fill(demoPassword);
    await approver.page.getByRole('dialog').getByRole('button', { name: 'Approve' }).click();
    await approver.page.getByText('This issue is approved and never changes.').waitFor();

    const answer = await approver.page.request.get(`${testAddress()}/api/plans/${address.split('/').at(-1) ?? ''}`);
    const plan = (await answer.json()) as Kept;
    const zone = plan.criteria.zones.find(({ id }) => id === 'X');
    expect([plan.state, zone?.polygon.length]).toEqual(['approved', 3]);
    expect(zone?.polygon.flat().every((um) => Number.isInteger(um) && um % 100 === 0)).toBe(true);
    for (const desk of [administrator, checker, approver]) expectNoFaults(desk);
  });
});
