import { createHash } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { POST as acknowledge } from '@/app/api/certificates/[number]/acknowledgement/route';
import { GET as pdf } from '@/app/api/certificates/[number]/pdf/route';
import { GET as read } from '@/app/api/certificates/[number]/route';
import { POST as withdraw } from '@/app/api/certificates/[number]/withdrawal/route';
import { GET as list } from '@/app/api/certificates/route';
import { GET as readJob } from '@/app/api/jobs/[id]/route';
import { closeDatabase } from '@/db/connection';
import { newId } from '@/db/identity';
import { reading, select, selectOne } from '@/db/work';
import { issue } from '@/services/certificates/issue';
import { mailCertificate } from '@/services/certificates/mail-certificate';
import { certificate as shape, listCertificates } from '@/services/contracts/certificates';
import { job as jobShape } from '@/services/contracts/jobs';
import { handlers } from '@/services/jobs/handlers';
import { runNext } from '@/services/jobs/run-next';
import { certificateRecordBytes, certificateRecord } from '@/services/pdf/certificate-record';
import { readPlantRoots } from '@/services/seal/plant-roots';
import {
  dropFolder,
  freshFolder,
  judge,
  needPrograms,
  putFile,
  signatureIn,
  trustStore,
} from '../services/certificate-outside-judges';
import { mailFolder } from '../support/stack';
import { call, person, signingPassword, type Person } from './inspection-setting';
import { finishedPart, floor, prepareFloor, released } from './release-setting';
import { bench } from './signing-setting';

interface Issued {
  number: string;
  job: string;
  serials: string[];
  releaseId: string;
}

let issued: Issued;

/** The id of the release that a certificate is about. */
async function releaseOf(number: string): Promise<string> {
  const row = await selectOne<{ id: string }>(reading(), 'SELECT release_id AS id FROM certificates WHERE number = ?', [number]);
  return row?.id ?? '';
}

/** A signed release whose certificate is not issued yet. */
async function signedOnly(count = 1): Promise<Issued> {
  const parts: { id: string; serial: string }[] = [];
  while (parts.length < count) parts.push(await finishedPart());
  const { certificate, job } = await released(parts);
  return { number: certificate, job, serials: parts.map(({ serial }) => serial).sort(), releaseId: await releaseOf(certificate) };
}

const job = async (id: string) => jobShape.parse((await call(readJob, { as: floor.signatory, params: { id } })).json);

/** Runs due jobs, of whoever, until this one is done. */
async function workOff(id: string): Promise<void> {
  for (let turn = 0; turn < 300 && (await job(id)).state !== 'done'; turn += 1) await runNext(handlers);
}

async function fileOf(number: string, as: Person): Promise<Buffer> {
  const answer = await pdf(
    new Request(`http://127.0.0.1:3200/api/certificates/${number}/pdf`, { headers: { cookie: as.cookie } }),
    { params: Promise.resolve({ number }) },
  );
  expect(answer.status).toBe(200);
  return Buffer.from(await answer.arrayBuffer());
}

const certificate = async (number: string, as: Person = bench.auditor) =>
  shape.parse((await call(read, { as, params: { number } })).json);
const eventsOf = (id: string) =>
  select<{ kind: string }>(
    reading(),
    `SELECT kind FROM events WHERE subject_kind = 'certificate' AND subject_id = ? ORDER BY seq`,
    [id],
  ).then((rows) => rows.map(({ kind }) => kind));

beforeAll(async () => {
  await prepareFloor();
  issued = await signedOnly(3);
});
afterAll(closeDatabase);

describe('the certificate job', () => {
  test('seals and stores the certificate and mails the customer a link, through the outbox', async () => {
    const before = await certificate(issued.number);
    expect([before.state, before.issuedAt, before.waitsFor]).toEqual(['signed', null, null]);
    const early = await call(pdf, { as: floor.customer, params: { number: issued.number } });
    expect([early.status, early.problem]).toEqual([409, 'state-refused']);
    await workOff(issued.job);
    expect(await job(issued.job)).toMatchObject({
      state: 'done',
      progress: 100,
      result: { certificate: issued.number },
      error: null,
    });
    const after = await certificate(issued.number);
    expect(after).toMatchObject({ state: 'issued', quantity: 3, customer: 'Kestrel Turbines' });
    const file = await fileOf(issued.number, bench.auditor);
    expect([createHash('sha256').update(file).digest('hex'), file.length]).toEqual([after.sha256, after.bytes]);

    const mail = await selectOne<{ id: string }>(reading(), 'SELECT id FROM jobs WHERE unique_key = ?', [`mail-${after.id}`]);
    const asAuditor = async () =>
      jobShape.parse((await call(readJob, { as: bench.auditor, params: { id: mail?.id ?? '' } })).json);
    for (let turn = 0; turn < 300 && (await asAuditor()).state !== 'done'; turn += 1) await runNext(handlers);
    expect((await asAuditor()).result).toEqual({ to: 'q@kestrel.example' });
    const mails = readdirSync(mailFolder())
      .map((name) => readFileSync(path.join(mailFolder(), name), 'utf8'))
      .filter((text) => text.includes(after.id));
    expect(mails).toHaveLength(1);
    const text = mails[0] ?? '';
    expect(text).toContain(issued.number);
    // A mail server in between reads everything: no serial, part number, drawing or check code.
    for (const secret of [...issued.serials, after.partNumber, after.checkCode, 'application/pdf'])
      expect(text).not.toContain(secret);
    expect(await eventsOf(after.id)).toEqual(['release-signed', 'certificate-issued', 'certificate-mailed']);
  });

  test('is called valid by pdfsig and qpdf, and its attached record is the signed one', async (context) => {
    needPrograms(context, 'pdfsig', 'qpdf', 'certutil');
    await workOff(issued.job);
    const folder = freshFolder();
    try {
      const file = putFile(folder, 'certificate.pdf', await fileOf(issued.number, bench.auditor));
      const [root = ''] = await readPlantRoots(process.env.RINGTRUE_KEYS_FOLDER ?? '');
      const seen = judge('pdfsig', '-nssdir', trustStore(folder, root), file);
      expect(seen.said).toContain('Signature is Valid');
      expect(seen.said).toContain('Certificate is Trusted');
      expect(seen.said).toContain('Total document signed');
      expect(judge('qpdf', '--check', file).status).toBe(0);
      const attached = judge('qpdf', '--list-attachments', file).printed.split(' ->')[0]?.trim() ?? '';
      const carried = judge('qpdf', `--show-attachment=${attached}`, file).printed;
      const row = await selectOne<{ record: Buffer }>(reading(), 'SELECT record FROM releases WHERE id = ?', [issued.releaseId]);
      expect(carried).toBe(row?.record.toString('utf8'));
      const altered = Buffer.from(readFileSync(file));
      // Behind the seal's own bytes, so that it is a signed one.
      const at = signatureIn(altered).holeEnd + 2000;
      altered[at] = (altered[at] ?? 0) ^ 1;
      expect(judge('pdfsig', '-nssdir', path.join(folder, 'nss'), putFile(folder, 'altered.pdf', altered)).said).not.toContain(
        'Signature is Valid',
      );
    } finally {
      dropFolder(folder);
    }
  });

  test('run again, or twice at once, issues nothing anew and mails nothing twice', async () => {
    const one = await signedOnly();
    await Promise.all([issue(one.releaseId), issue(one.releaseId)]);
    const first = await certificate(one.number);
    await issue(one.releaseId);
    const again = await certificate(one.number);
    expect([again.sha256, again.issuedAt]).toEqual([first.sha256, first.issuedAt]);
    expect((await eventsOf(first.id)).filter((kind) => kind === 'certificate-issued')).toHaveLength(1);
    const count = () =>
      readdirSync(mailFolder()).filter((name) => readFileSync(path.join(mailFolder(), name), 'utf8').includes(first.id)).length;
    await mailCertificate(first.id);
    await mailCertificate(first.id);
    expect(count()).toBe(1);
    const stored = await selectOne<{ record: Buffer }>(reading(), 'SELECT record FROM releases WHERE id = ?', [one.releaseId]);
    const record = certificateRecord.parse(JSON.parse(stored?.record.toString('utf8') ?? '{}'));
    expect(Buffer.from(certificateRecordBytes(record)).equals(stored?.record ?? Buffer.alloc(0))).toBe(true);
  });
});

describe('a certificate', () => {
  test('is seen by staff, auditors and its own customer, and does not exist for another', async () => {
    await issue(issued.releaseId);
    const { number } = issued;
    expect((await call(read, { params: { number } })).status).toBe(401);
    for (const who of [floor.customer, bench.inspector, floor.administrator, floor.reviewer, bench.auditor])
      expect((await call(read, { as: who, params: { number } })).status).toBe(200);
    const foreign = await call(read, { as: floor.stranger, params: { number } });
    const absent = await call(read, { as: floor.stranger, params: { number: 'C-2026-99999' } });
    expect([foreign.status, absent.status]).toEqual([404, 404]);
    expect(foreign.detail.replace(number, '')).toBe(absent.detail.replace('C-2026-99999', ''));
    expect((await call(pdf, { as: floor.stranger, params: { number } })).status).toBe(404);
    expect((await call(pdf, { params: { number } })).status).toBe(401);
    const answer = await call(acknowledge, { method: 'POST', as: floor.stranger, params: { number }, body: {} });
    expect(answer.status).toBe(404);
  });

  test('is listed to its customer alone, whatever is asked', async () => {
    const numbers = async (as: Person, query = '?limit=200') =>
      listCertificates.response.parse((await call(list, { as, query })).json).items.map(({ number }) => number);
    expect(await numbers(floor.customer)).toContain(issued.number);
    expect(await numbers(floor.stranger)).toEqual([]);
    expect(await numbers(floor.stranger, `?serial=${issued.serials[0] ?? ''}`)).toEqual([]);
    expect(await numbers(bench.auditor, `?serial=${issued.serials[0] ?? ''}`)).toEqual([issued.number]);
    expect((await call(list, {})).status).toBe(401);
    // A customer account without a customer sees nothing rather than everything.
    expect(await numbers(await person('customer-quality'))).toEqual([]);
  });

  test('shows its customer no ids of parts and no names of staff but the signatory', async () => {
    const outside = await certificate(issued.number, floor.customer);
    const inside = await certificate(issued.number);
    expect(outside.serials.map(({ serial, part }) => [serial, part])).toEqual(issued.serials.map((serial) => [serial, null]));
    expect(inside.serials.every(({ part }) => part !== null)).toBe(true);
    expect([outside.signedBy, outside.shipment, inside.shipment?.startsWith('S-')]).toEqual([floor.signatory.name, null, true]);
  });

  test('keeps who of the customer downloaded it, and what arrived', async () => {
    const one = await signedOnly();
    const params = { number: one.number };
    const early = await call(acknowledge, { method: 'POST', as: floor.customer, params, body: {} });
    expect([early.status, early.problem]).toEqual([409, 'state-refused']);
    await issue(one.releaseId);
    const file = await fileOf(one.number, floor.customer);
    expect(file.subarray(0, 5).toString()).toBe('%PDF-');
    await fileOf(one.number, bench.auditor);
    for (const who of [bench.inspector, bench.auditor, floor.administrator, floor.signatory])
      expect((await call(acknowledge, { method: 'POST', as: who, params, body: {} })).status).toBe(403);
    const silent = await call(acknowledge, { method: 'POST', as: floor.customer, params, body: { received: 'with-difference' } });
    expect([silent.status, silent.errors[0]?.path]).toEqual([422, 'note']);
    const body = { received: 'with-difference', note: 'One box was wet.' };
    expect((await call(acknowledge, { method: 'POST', as: floor.customer, params, body })).status).toBe(201);
    const now = await certificate(one.number);
    expect(now.acknowledged).toBe(true);
    expect(now.receipts.map(({ kind, by, note }) => [kind, by, note])).toEqual([
      ['downloaded', floor.customer.name, null],
      ['received-with-difference', floor.customer.name, 'One box was wet.'],
    ]);
    expect(await eventsOf(now.id)).toEqual([
      'release-signed',
      'certificate-issued',
      'certificate-downloaded',
      'certificate-acknowledged',
    ]);
  });
});

describe('a withdrawal', () => {
  const withdrawing = (number: string, body: object, as: Person | null = floor.second) =>
    call(withdraw, {
      method: 'POST',
      params: { number },
      body: { reason: 'Dropped while it was packed.', password: signingPassword, ...body },
      ...(as ? { as } : {}),
    });

  test('is for reviewers with release authority, with their password', async () => {
    await issue(issued.releaseId);
    expect((await withdrawing(issued.number, {}, null)).status).toBe(401);
    for (const who of [bench.inspector, bench.auditor, floor.administrator, floor.reviewer, floor.customer])
      expect((await withdrawing(issued.number, {}, who)).status).toBe(403);
    expect((await withdrawing(issued.number, { password: 'not-mine' })).problem).toBe('signature-refused');
    expect((await withdrawing('C-2026-99999', {})).status).toBe(404);
    expect((await withdrawing(issued.number, { serials: ['NOBODY-1'] })).errors[0]?.path).toBe('serials.0');
    expect((await certificate(issued.number)).state).toBe('issued');
  });

  test('takes one serial while the others stay, then the rest', async () => {
    const one = await signedOnly(2);
    expect((await withdrawing(one.number, {})).problem).toBe('state-refused');
    await issue(one.releaseId);
    const [first = '', second = ''] = one.serials;
    const partly = await withdrawing(one.number, { serials: [first] });
    expect([partly.status, shape.parse(partly.json).state]).toEqual([201, 'partly-withdrawn']);
    expect((await certificate(one.number)).serials.map(({ withdrawn }) => withdrawn)).toEqual([true, false]);
    expect((await certificate(one.number, floor.customer)).withdrawals).toMatchObject([{ serial: first, by: '' }]);
    expect(shape.parse((await withdrawing(one.number, { serials: [second] })).json).state).toBe('withdrawn');
    expect((await withdrawing(one.number, {})).problem).toBe('state-refused');
  });
});

test('a job is shown to who asked for it, to administrators and auditors', async () => {
  const params = { id: issued.job };
  expect((await call(readJob, { params })).status).toBe(401);
  expect((await call(readJob, { as: floor.customer, params })).status).toBe(403);
  for (const who of [bench.inspector, floor.second]) expect((await call(readJob, { as: who, params })).status).toBe(404);
  for (const who of [floor.signatory, floor.administrator, bench.auditor])
    expect((await call(readJob, { as: who, params })).status).toBe(200);
  expect((await call(readJob, { as: bench.auditor, params: { id: newId() } })).status).toBe(404);
  expect((await call(readJob, { as: bench.auditor, params: { id: 'nobody' } })).status).toBe(404);
});
