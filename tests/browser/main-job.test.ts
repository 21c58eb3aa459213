import { execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import sharp from 'sharp';
import { afterAll, describe, expect, it } from 'vitest';
import { browserOfThisFile, expectNoFaults, openDesk, scratch } from '../support/browser';
import { testAddress } from '../support/stack';
import { examine, measureWalls, penetrant, radiograph, weigh } from './bench-steps';
import { codesOn, download, gatherAndRelease, traceAsAuditor, trustedBy, verifyAsStranger } from './release-steps';

const serial = 'T10413';
const dicom = '/usr/lib/python3/dist-packages/pydicom/data/test_files/CT_small.dcm';

const files = scratch();
const browser = browserOfThisFile();

afterAll(files.remove);

const missing = (program: string): boolean =>
  !['/usr/bin', '/usr/local/bin', '/bin'].some((folder) => existsSync(path.join(folder, program)));

async function takePhotograph(): Promise<string> {
  const file = path.join(files.folder, 'penetrant.jpg');
  const picture = sharp({ create: { width: 900, height: 600, channels: 3, background: '#12061c' } });
  writeFileSync(file, await picture.jpeg().toBuffer());
  return file;
}

interface Recorded {
  readonly number: string;
  readonly verifyUrl: string;
  readonly serials: { readonly serial: string; readonly heat: string }[];
}

function attachedTo(pdf: string): Recorded {
  const file = path.join(files.folder, 'record.json');
  execFileSync('pdfdetach', ['-save', '1', '-o', file, pdf]);
  return JSON.parse(readFileSync(file, 'utf8')) as Recorded;
}

describe('the main job, from sign-in to the trace', () => {
  it('is done by its people on real servers', { timeout: 240_000 }, async (context) => {
    for (const program of ['pdfsig', 'qpdf', 'zbarimg', 'pdfdetach', 'pdftoppm', 'certutil']) {
      if (missing(program)) context.skip(`${program} is not installed`);
    }
    if (!existsSync(dicom)) context.skip('python3-pydicom is not installed');
    const inspector = await browser.desk('inspector@aldermoor.example');
    const photograph = await takePhotograph();
    await measureWalls(inspector.page, serial, files.folder);
    await examine(inspector.page, serial, 'Visual after cut-off', '40');
    await penetrant(inspector.page, serial, photograph);
    await radiograph(inspector.page, serial, dicom);
    await weigh(inspector.page, serial);
    await examine(inspector.page, serial, 'Mark and read back', '42');

    const administrator = await browser.desk('administrator@aldermoor.example');
    const signatory = await browser.desk('signatory@aldermoor.example');
    const number = await gatherAndRelease(administrator, signatory, serial);

    const customer = await browser.desk('quality@tarnside.example');
    const pdf = await download(customer, number, files.folder);
    const other = await browser.desk('quality@corvane.example');
    const foreign = await other.page.goto(`${testAddress()}/api/certificates/${number}/pdf`);
    expect(foreign?.status()).toBe(404);

    // Poppler's pdfsig, qpdf, pdfdetach and zbarimg judge the paper, not our own reader.
    expect(trustedBy(pdf, files.folder)).toMatch(/Signature is Valid[\s\S]*Certificate is Trusted/);
    execFileSync('qpdf', ['--check', pdf]);
    const record = attachedTo(pdf);
    expect(record.number).toBe(number);
    expect(record.serials).toMatchObject([{ serial, heat: 'H-26-118' }]);
    expect(codesOn(pdf, files.folder)).toContain(record.verifyUrl);

    const stranger = await openDesk(browser.open());
    await verifyAsStranger(stranger, record.verifyUrl, pdf, files.folder);
    const auditor = await browser.desk('auditor@fennick.example');
    const pixels = createHash('sha256').update(readFileSync(photograph)).digest('hex').slice(0, 8);
    await traceAsAuditor(auditor, serial, ['H-26-118', pixels, number, 'DD-02']);
    expectNoFaults(inspector, { cut: true });
    for (const desk of [administrator, signatory, customer, stranger, auditor]) expectNoFaults(desk);
  });
});
