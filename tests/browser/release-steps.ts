import { execFileSync } from 'node:child_process';
import { readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { demoPassword, picture, type Desk } from '../support/browser';
import { testAddress } from '../support/stack';

export async function gatherAndRelease(administrator: Desk, signatory: Desk, serial: string): Promise<string> {
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

/** What the receiving inspector does with the paper: the file as saved, acknowledged. */
export async function download(customer: Desk, number: string, folder: string): Promise<string> {
  const { page } = customer;
  await page.goto(`${testAddress()}/certificates/${number}`);
  const button = page.getByRole('link', { name: 'Download PDF' });
  await button.waitFor({ timeout: 60_000 });
  const [file] = await Promise.all([page.waitForEvent('download'), button.click()]);
  const saved = path.join(folder, `${number}.pdf`);
  await file.saveAs(saved);
  await page.getByRole('button', { name: 'Send acknowledgement' }).click();
  await page.getByText(/acknowledged by/).waitFor();
  await picture(page, 'certificate-customer');
  return saved;
}

export function trustedBy(pdf: string, folder: string): string {
  // pdfsig trusts what its NSS store trusts: the plant's root goes in first (poppler, from Debian).
  const store = path.join(folder, 'nss');
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

/** The contents of every QR code that a scanner finds on the pages of the paper. */
export function codesOn(pdf: string, folder: string): string[] {
  execFileSync('pdftoppm', ['-png', '-r', '200', pdf, path.join(folder, 'page')]);
  // zbarimg ends with 4 when one of the pictures has no code, which pages after the first have not.
  const found = execFileSync('sh', ['-c', 'zbarimg -q --raw page*.png || test $? -eq 4'], { cwd: folder, encoding: 'utf8' });
  return found.trim().split('\n');
}

/** A stranger with the paper, then with a copy of which one bit was changed. */
export async function verifyAsStranger(stranger: Desk, verifyUrl: string, pdf: string, folder: string): Promise<void> {
  const { page } = stranger;
  await page.goto(verifyUrl.replace(/^https?:\/\/[^/]+/, testAddress()));
  await page.getByRole('button', { name: 'Check number' }).click();
  await page.getByText(/^Valid: this certificate/).waitFor();
  await picture(page, 'verify-valid');
  await page.getByLabel('Certificate file (PDF)').setInputFiles(pdf);
  await page.getByText(/^Valid: this certificate/).waitFor();
  const bytes = readFileSync(pdf);
  const place = Math.floor(bytes.length / 3);
  bytes[place] = (bytes[place] ?? 0) ^ 1;
  const altered = path.join(folder, 'altered.pdf');
  writeFileSync(altered, bytes);
  await page.getByLabel('Certificate file (PDF)').setInputFiles(altered);
  await page.getByText(/^Altered:/).waitFor();
}

/** The auditor gets a serial number, and finds the heat, the pixel, the certificate and who signed. */
export async function traceAsAuditor(auditor: Desk, serial: string, expected: readonly string[]): Promise<void> {
  const { page } = auditor;
  await page.goto(`${testAddress()}/trace`);
  const search = page.getByRole('main');
  await search.getByLabel('Serial').fill(serial);
  await search.getByRole('button', { name: 'Find', exact: true }).click();
  await search.getByRole('link', { name: serial }).click();
  await page.getByRole('heading', { level: 1, name: new RegExp(`History of ${serial}`) }).waitFor();
  for (const text of expected) await page.getByText(text).first().waitFor();
  await picture(page, 'trace');
}
