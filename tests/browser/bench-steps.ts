import { writeFileSync } from 'node:fs';
import path from 'node:path';
import type { Page } from 'playwright-core';
import { expect } from 'vitest';
import { demoPassword, picture } from '../support/browser';
import { testAddress } from '../support/stack';

const stations = ['21', '22', '23', '24', '25', '26', '27', '28'];
const walls = ['0.912', '0.905', '0.893', '0.884', '0.902', '0.921', '0.871', '0.889'];

async function openPart(page: Page, serial: string): Promise<void> {
  await page.goto(`${testAddress()}/parts?serial=${serial}`);
  await page.getByText(serial, { exact: true }).first().click();
  await page.getByRole('heading', { level: 1, name: new RegExp(serial) }).waitFor();
}

export async function inspect(page: Page, serial: string, title: string): Promise<void> {
  await openPart(page, serial);
  await page
    .getByRole('button', { name: new RegExp(`(Inspect|Go on with) .*${title}`) })
    .first()
    .click();
  await page.waitForURL(/\/inspections\//);
  await page.getByRole('heading', { level: 1 }).waitFor();
}

async function act(page: Page, name: string): Promise<void> {
  await page.getByRole('checkbox', { name: new RegExp(`^${name}`) }).check();
}

async function equip(page: Page, actName: string, number: string): Promise<void> {
  const pieces = page.getByRole('group', { name: `Equipment for ${actName}` });
  await pieces.getByRole('checkbox', { name: new RegExp(`^${number}`) }).check();
}

async function block(page: Page, when: 'before' | 'after'): Promise<void> {
  for (const nominal of ['1.00', '2.00', '3.00']) await page.getByLabel(`Step ${nominal}, Step block ${when}`).fill(nominal);
}

export async function sign(page: Page): Promise<void> {
  // The words are compared, so that a failed save says why.
  await expect.poll(() => page.locator('[data-saved]').textContent(), { timeout: 30_000 }).toBe('Saved');
  await page.getByRole('button', { name: 'Sign', exact: true }).click();
  await page.getByLabel('Password or PIN').fill(demoPassword);
  await page.getByRole('button', { name: 'Sign now' }).click();
  await page
    .getByText(/^Signed as I-/)
    .first()
    .waitFor();
}

async function attach(page: Page, file: string): Promise<void> {
  await page.getByLabel('Attach a file').setInputFiles(file);
  await page.getByRole('button', { name: new RegExp(`Show ${path.basename(file)}`) }).waitFor();
}

export async function measureWalls(page: Page, serial: string, folder: string): Promise<void> {
  await inspect(page, serial, 'Ultrasonic wall thickness');
  const csv = path.join(folder, 'walls.csv');
  writeFileSync(
    csv,
    [
      'station;thickness;unit',
      ...stations.map((station, place) => `${station};${(walls[place] ?? '').replace('.', ',')};mm`),
    ].join('\r\n'),
  );
  await page.getByLabel('Readings from a CSV file').setInputFiles(csv);
  await expect.poll(() => page.getByLabel('Reading 21').inputValue()).toBe('0.912');
  // What is no number is named at its field, and nothing is lost by it.
  await page.getByLabel('Reading 22').fill('1,2,3');
  await page
    .getByText(/decimal/)
    .first()
    .waitFor();
  await page.getByLabel('Reading 22').fill('0,905');
  await block(page, 'before');
  await act(page, 'Measured');
  await equip(page, 'Measured', 'UT-07');
  await block(page, 'after');
  await page.getByLabel('Every view this operation asks for was examined.').check();
  await page.locator('[data-saved="saved"]').waitFor();
  await page.reload();
  await expect.poll(() => page.getByLabel('Reading 22').inputValue()).toBe('0.905');
  await picture(page, 'bench-wall');
  await sign(page);
}

export async function examine(page: Page, serial: string, title: string, attribute: string): Promise<void> {
  await inspect(page, serial, title);
  await page
    .getByRole('group', { name: new RegExp(`^${attribute}`) })
    .getByRole('radio', { name: 'conforming', exact: true })
    .check();
  await act(page, 'Evaluated');
  await page.getByLabel('Every view this operation asks for was examined.').check();
  await sign(page);
}

export async function penetrant(page: Page, serial: string, photograph: string): Promise<void> {
  await inspect(page, serial, 'Fluorescent penetrant');
  for (const [label, value] of [
    ['P1', '30'],
    ['P2', '210'],
    ['P3', '60'],
    ['P4', '1850'],
    ['P5', '8'],
  ] as const) {
    await page.getByLabel(new RegExp(`^${label} `)).fill(value);
  }
  await attach(page, photograph);
  await page.getByLabel('Length, mm').fill('0,38');
  await page.getByLabel('Width, mm').fill('0.30');
  await page.getByRole('button', { name: 'Add indication' }).click();
  await page.getByText('0.38 × 0.3 mm').waitFor();
  // The network is gone while an entry is made, and comes back by itself: nothing is lost.
  await page.route('**/api/inspections/*', (call) => call.abort());
  await act(page, 'Processed');
  await page.locator('[data-saved="unsaved"]').waitFor();
  await page.unroute('**/api/inspections/*');
  await page.locator('[data-saved="saved"]').waitFor();
  await act(page, 'Evaluated');
  await equip(page, 'Evaluated', 'UV-11');
  await page.getByLabel('Every view this operation asks for was examined.').check();
  await picture(page, 'bench-penetrant');
  await sign(page);
}

export async function radiograph(page: Page, serial: string, file: string): Promise<void> {
  await inspect(page, serial, 'Digital radiography');
  await attach(page, file);
  await act(page, 'Exposed');
  await page.getByLabel('Tube voltage, kV').fill('160');
  await page.getByLabel(/^Indicator seen/).fill('W13');
  await equip(page, 'Exposed', 'DD-02');
  await page.getByRole('group', { name: /^41/ }).getByRole('radio', { name: 'conforming', exact: true }).check();
  await act(page, 'Evaluated');
  await page.getByLabel('Every view this operation asks for was examined.').check();
  await picture(page, 'bench-radiograph');
  await sign(page);
}

export async function weigh(page: Page, serial: string): Promise<void> {
  await inspect(page, serial, 'Weighing');
  await page.getByLabel('Reading M1').fill('411.2');
  await act(page, 'Measured');
  await equip(page, 'Measured', 'BA-01');
  await page.getByLabel('Every view this operation asks for was examined.').check();
  await sign(page);
}
