import { execFileSync } from 'node:child_process';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openBrowser, openDesk, picture, scratch, signIn, demoPassword, type Desk } from '../support/browser';
import { testAddress } from '../support/stack';

const serial = 'T10413';
const dicom = '/usr/lib/python3/dist-packages/pydicom/data/test_files/CT_small.dcm';
const stations = ['21', '22', '23', '24', '25', '26', '27', '28'];
const walls = ['0.912', '0.905', '0.893', '0.884', '0.902', '0.921', '0.871', '0.889'];

let browser: Browser;
const files = scratch();

beforeAll(async () => {
  browser = await openBrowser();
});

afterAll(async () => {
  await browser.close();
  files.remove();
});

function has(program: string): boolean {
  return ['/usr/bin', '/usr/local/bin', '/bin'].some((folder) => existsSync(path.join(folder, program)));
}

async function openPart(page: Page): Promise<void> {
  await page.goto(`${testAddress()}/parts?serial=${serial}`);
  await page.getByText(serial, { exact: true }).first().click();
  await page.getByRole('heading', { level: 1, name: new RegExp(serial) }).waitFor();
}

async function inspect(page: Page, title: string): Promise<void> {
  await openPart(page);
  await page.getByRole('button', { name: new RegExp(`(Inspect|Go on with) .*${title}`) }).click();
  await page.waitForURL(/\/inspections\//);
  await page.getByRole('heading', { level: 1 }).waitFor();
}

async function act(page: Page, name: string): Promise<void> {
  await page.getByRole('checkbox', { name: new RegExp(`^${name}`) }).check();
}

async function equip(page: Page, actName: string, number: string): Promise<void> {
  const select = page.getByLabel(`Equipment for ${actName}`);
  const value = await select.locator('option', { hasText: number }).first().getAttribute('value');
  await select.selectOption(value ?? '');
}

async function block(page: Page, when: 'before' | 'after'): Promise<void> {
  for (const nominal of ['1.00', '2.00', '3.00']) await page.getByLabel(`Step ${nominal}, Step block ${when}`).fill(nominal);
}

async function sign(page: Page): Promise<void> {
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

async function measureWalls(page: Page): Promise<void> {
  await inspect(page, 'Ultrasonic wall thickness');
  const csv = path.join(files.folder, 'walls.csv');
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

async function examine(page: Page, title: string, attribute: string): Promise<void> {
  await inspect(page, title);
  await page
    .getByRole('group', { name: new RegExp(`^${attribute}`) })
    .getByRole('radio', { name: 'conforming', exact: true })
    .check();
  await act(page, 'Evaluated');
  await page.getByLabel('Every view this operation asks for was examined.').check();
  await sign(page);
}

async function penetrant(page: Page, photograph: string): Promise<void> {
  await inspect(page, 'Fluorescent penetrant');
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

async function radiograph(page: Page): Promise<void> {
  await inspect(page, 'Digital radiography');
  await attach(page, dicom);
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

async function weigh(page: Page): Promise<void> {
  await inspect(page, 'Weighing');
  await page.getByLabel('Reading M1').fill('411.2');
  await act(page, 'Measured');
  await equip(page, 'Measured', 'BA-01');
  await page.getByLabel('Every view this operation asks for was examined.').check();
  await sign(page);
}

async function gatherAndRelease(administrator: Desk, signatory: Desk): Promise<string> {
  const { page } = administrator;
  await page.goto(`${testAddress()}/shipments`);
  const line = page.getByLabel('Order line');
  const option = await line.locator('option', { hasText: 'AM-2210' }).first().getAttribute('value');
  await line.selectOption(option ?? '');
  await page.getByLabel(/^Serials, separated/).fill(serial);
  await page.getByRole('button', { name: 'Create shipment' }).click();
  await page.waitForURL(/\/shipments\/S-/);
  await page.getByText('All gates are open.').waitFor();
  await picture(page, 'shipment');
  const number = page.url().split('/').at(-1) ?? '';
  await signatory.page.goto(`${testAddress()}/shipments/${number}`);
  await signatory.page.getByRole('button', { name: 'Sign release', exact: true }).click();
  await signatory.page.getByLabel('Password').fill(demoPassword);
  await signatory.page.getByRole('button', { name: 'Sign release now' }).click();
  const link = signatory.page.getByRole('link', { name: /^C-/ });
  await link.waitFor();
  return (await link.textContent()) ?? '';
}

async function download(customer: Desk, number: string): Promise<string> {
  const { page } = customer;
  await page.goto(`${testAddress()}/certificates/${number}`);
  const button = page.getByRole('link', { name: 'Download PDF' });
  await button.waitFor({ timeout: 60_000 });
  const [file] = await Promise.all([page.waitForEvent('download'), button.click()]);
  const saved = path.join(files.folder, `${number}.pdf`);
  await file.saveAs(saved);
  await page.getByRole('button', { name: 'Send acknowledgement' }).click();
  await page.getByText(/acknowledged by/).waitFor();
  await picture(page, 'certificate-customer');
  return saved;
}

function trustedBy(pdf: string): string {
  // pdfsig trusts what its NSS store trusts: the plant's root goes in first (poppler, from Debian).
  const store = path.join(files.folder, 'nss');
  execFileSync('mkdir', ['-p', store]);
  execFileSync('certutil', ['-N', '--empty-password', '-d', `sql:${store}`]);
  const keys = process.env.RINGTRUE_KEYS_FOLDER ?? '';
  execFileSync('certutil', [
    '-A',
    '-n',
    'plant',
    '-t',
    'CT,C,C',
    '-i',
    path.join(keys, 'root', 'certificate.pem'),
    '-d',
    `sql:${store}`,
  ]);
  return execFileSync('pdfsig', ['-nssdir', `sql:${store}`, pdf], { encoding: 'utf8' });
}

describe('the main job, from sign-in to the sealed certificate', () => {
  it('is done by its people on real servers', { timeout: 240_000 }, async (context) => {
    for (const program of ['pdfsig', 'qpdf', 'pdfdetach', 'certutil']) {
      if (!has(program)) context.skip(`${program} is not installed`);
    }
    if (!existsSync(dicom)) context.skip('python3-pydicom is not installed');
    const inspector = await openDesk(browser);
    await signIn(inspector, 'inspector@aldermoor.example');
    const photograph = path.join(files.folder, 'penetrant.jpg');
    const sharp = (await import('sharp')).default;
    writeFileSync(
      photograph,
      await sharp({ create: { width: 900, height: 600, channels: 3, background: '#12061c' } })
        .jpeg()
        .toBuffer(),
    );
    await measureWalls(inspector.page);
    await examine(inspector.page, 'Visual after cut-off', '40');
    await penetrant(inspector.page, photograph);
    await radiograph(inspector.page);
    await weigh(inspector.page);
    await examine(inspector.page, 'Mark and read back', '42');

    const administrator = await openDesk(browser);
    await signIn(administrator, 'administrator@aldermoor.example');
    const signatory = await openDesk(browser);
    await signIn(signatory, 'signatory@aldermoor.example');
    const number = await gatherAndRelease(administrator, signatory);

    const customer = await openDesk(browser);
    await signIn(customer, 'quality@tarnside.example');
    const pdf = await download(customer, number);
    const other = await openDesk(browser);
    await signIn(other, 'quality@corvane.example');
    const foreign = await other.page.goto(`${testAddress()}/api/certificates/${number}/pdf`);
    expect(foreign?.status()).toBe(404);

    expect(trustedBy(pdf)).toMatch(/Signature is Valid[\s\S]*Certificate is Trusted/);
    execFileSync('qpdf', ['--check', pdf]);
    execFileSync('pdfdetach', ['-save', '1', '-o', path.join(files.folder, 'record.json'), pdf]);
    const record = JSON.parse(readFileSync(path.join(files.folder, 'record.json'), 'utf8')) as {
      number: string;
      serials: { serial: string; heat: string }[];
    };
    expect(record.number).toBe(number);
    expect(record.serials).toMatchObject([{ serial, heat: 'H-26-118' }]);
  });
});
