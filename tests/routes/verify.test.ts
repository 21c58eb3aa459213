import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { POST as withdraw } from '@/app/api/certificates/[number]/withdrawal/route';
import { GET as byNumber } from '@/app/api/verify/[number]/route';
import { POST as byFile } from '@/app/api/verify/route';
import { closeDatabase } from '@/db/connection';
import { execute, inTransaction, reading, selectOne } from '@/db/work';
import { issue } from '@/services/certificates/issue';
import { verifyAnswer } from '@/services/contracts/certificates';
import { certificateRecord } from '@/services/pdf/certificate-record';
import { issueCertificate } from '@/services/seal/issue-certificate';
import { openPlantKeys } from '@/services/seal/plant-keys';
import { objectStore } from '@/services/storage/object-store';
import { dropFolder, freshFolder } from '../services/certificate-outside-judges';
import { call, signingPassword } from './inspection-setting';
import { finishedPart, floor, prepareFloor, released } from './release-setting';
import { bench } from './signing-setting';

interface Paper {
  number: string;
  checkCode: string;
  serials: string[];
  file: Buffer;
}

let paper: Paper;

async function bytesOf(key: string): Promise<Buffer> {
  const chunks: Buffer[] = [];
  for await (const chunk of await objectStore().getStream(key)) chunks.push(Buffer.from(chunk as Uint8Array));
  return Buffer.concat(chunks);
}

async function issuedPaper(count: number): Promise<Paper> {
  const parts: { id: string; serial: string }[] = [];
  while (parts.length < count) parts.push(await finishedPart());
  const { certificate: number } = await released(parts);
  const row = async () =>
    selectOne<{ releaseId: string; checkCode: string; key: string | null }>(
      reading(),
      'SELECT release_id AS releaseId, check_code AS checkCode, storage_key AS `key` FROM certificates WHERE number = ?',
      [number],
    );
  await issue((await row())?.releaseId ?? '');
  const stored = await row();
  return {
    number,
    checkCode: stored?.checkCode ?? '',
    serials: parts.map(({ serial }) => serial).sort(),
    file: await bytesOf(stored?.key ?? ''),
  };
}

let addresses = 0;
/** An address that has guessed nothing yet. */
const fresh = () => `test ${bench.plan.drawingId.slice(-6)} ${String((addresses += 1))}`;

function ask(number: string, check: string, address = fresh()) {
  return call(byNumber, {
    params: { number },
    query: `?check=${encodeURIComponent(check)}`,
    headers: { 'x-forwarded-for': address },
  });
}

function show(file: Uint8Array | string, address = fresh()) {
  return call(byFile, {
    method: 'POST',
    body: file,
    headers: { 'x-forwarded-for': address, 'content-type': typeof file === 'string' ? 'application/json' : 'application/pdf' },
  });
}

const stateOf = ({ json }: { json: unknown }) => verifyAnswer.parse(json).state;
const digestOf = (file: Uint8Array) => createHash('sha256').update(file).digest('hex');
const unknown = {
  state: 'unknown',
  number: null,
  issuedAt: null,
  partNumber: null,
  quantity: null,
  withdrawnSerials: [],
  replacedBy: null,
};

beforeAll(async () => {
  await prepareFloor();
  paper = await issuedPaper(2);
});
afterAll(closeDatabase);

describe('by number and check code', () => {
  test('a stranger learns that it is valid, and no more than the paper says', async () => {
    const answer = await ask(paper.number, paper.checkCode);
    expect(answer.status).toBe(200);
    const told = verifyAnswer.parse(answer.json);
    expect(told).toMatchObject({ state: 'valid', number: paper.number, quantity: 2, withdrawnSerials: [] });
    for (const secret of [...paper.serials, 'Kestrel', floor.signatory.name])
      expect(JSON.stringify(answer.json)).not.toContain(secret);
    expect(stateOf(await ask(paper.number, paper.checkCode.toLowerCase()))).toBe('valid');
  });

  test('a wrong code, no code and an unknown number are the same answer', async () => {
    for (const [number, check] of [
      [paper.number, 'AAAAAAAA-BBBBBB-CCCCCC-DDDDDD'],
      [paper.number, ''],
      [paper.number, paper.checkCode.slice(0, -1)],
      ['C-2026-99999', paper.checkCode],
    ] as const) {
      const answer = await ask(number, check);
      expect([answer.status, answer.json]).toEqual([200, unknown]);
    }
  });

  test('guessing from one address is stopped after ten; others are not', async () => {
    const guesser = fresh();
    for (let guess = 0; guess < 10; guess += 1)
      expect((await ask(paper.number, `GUESS-${String(guess)}`, guesser)).status).toBe(200);
    const stopped = await ask(paper.number, paper.checkCode, guesser);
    expect([stopped.status, stopped.problem, stopped.headers.get('retry-after')]).toEqual([429, 'too-many-attempts', '900']);
    expect(stateOf(await ask(paper.number, paper.checkCode))).toBe('valid');
    expect((await ask(paper.number, 'AAAA', 'x'.repeat(300))).status).toBe(200);
  });

  test('signed and not issued yet is unknown to the world', async () => {
    const { certificate } = await released([await finishedPart()]);
    const row = await selectOne<{ code: string }>(reading(), 'SELECT check_code AS code FROM certificates WHERE number = ?', [
      certificate,
    ]);
    expect((await ask(certificate, row?.code ?? '')).json).toEqual(unknown);
  });
});

describe('by file', () => {
  test('the issued file, and its digest alone, are valid', async () => {
    expect(verifyAnswer.parse((await show(paper.file)).json)).toMatchObject({ state: 'valid', number: paper.number });
    expect(stateOf(await show(JSON.stringify({ sha256: digestOf(paper.file) })))).toBe('valid');
    expect((await show(JSON.stringify({ sha256: '0'.repeat(64) }))).json).toEqual(unknown);
    for (const body of ['{', 'null', '{"sha256": "zz"}']) expect((await show(body)).errors[0]?.path).toBe('sha256');
  });

  test('one changed byte, wherever it is, a cut and an appendix are altered', async () => {
    for (let place = 0; place < 40; place += 1) {
      const altered = Buffer.from(paper.file);
      const at = Math.floor(((place + 0.5) / 40) * altered.length);
      altered[at] = (altered[at] ?? 0) ^ 1;
      expect([at, stateOf(await show(altered))]).toEqual([at, 'altered']);
    }
    expect(stateOf(await show(Buffer.concat([paper.file, Buffer.from('\n%%EOF\n')])))).toBe('altered');
  });

  test('a second sealing of the same release is not the certificate that was issued', async () => {
    const row = await selectOne<{ record: Buffer }>(
      reading(),
      'SELECT r.record FROM releases r JOIN certificates c ON c.release_id = r.id WHERE c.number = ?',
      [paper.number],
    );
    const record = certificateRecord.parse(JSON.parse(row?.record.toString('utf8') ?? '{}'));
    const place = {
      passphrase: process.env.RINGTRUE_KEYS_PASSPHRASE ?? '',
      plantName: 'Plant',
      now: new Date('2026-12-02T00:00:00Z'),
    };
    const ours = await openPlantKeys({ ...place, folder: process.env.RINGTRUE_KEYS_FOLDER ?? '' });
    const again = await issueCertificate(record, { keys: ours, sealedAt: place.now });
    expect(stateOf(await show(Buffer.from(again.bytes)))).toBe('altered');
    const folder = freshFolder();
    try {
      const forged = await issueCertificate(record, { keys: await openPlantKeys({ ...place, folder }), sealedAt: place.now });
      expect((await show(Buffer.from(forged.bytes))).json).toEqual(unknown);
    } finally {
      dropFolder(folder);
    }
  });

  test('what is no certificate of ours is unknown; more than 20 MiB is refused, announced or not', async () => {
    expect((await show(Buffer.from('%PDF-1.7\n%%EOF\n'))).json).toEqual(unknown);
    expect((await show(Buffer.from([0, 1, 2]))).json).toEqual(unknown);
    const large = Buffer.alloc(20 * 1024 * 1024 + 1);
    const refused = await show(large);
    expect([refused.status, refused.problem]).toEqual([413, 'too-large']);
    const announced = await call(byFile, {
      method: 'POST',
      body: Buffer.from('%PDF-'),
      headers: { 'content-type': 'application/pdf', 'content-length': '99999999' },
    });
    expect(announced.status).toBe(413);
  });

  test('the same wrong file is answered ten times, then has to wait', async () => {
    const address = fresh();
    const file = Buffer.from('%PDF-1.7 not ours');
    for (let turn = 0; turn < 10; turn += 1) expect((await show(file, address)).status).toBe(200);
    expect((await show(file, address)).status).toBe(429);
    expect(stateOf(await show(paper.file, address))).toBe('valid');
  });
});

test('says what was withdrawn, and what replaces it', async () => {
  const one = await issuedPaper(2);
  const [first = ''] = one.serials;
  const withdrawing = (body: object) =>
    call(withdraw, {
      method: 'POST',
      as: floor.second,
      params: { number: one.number },
      body: { reason: 'Dropped while it was packed.', password: signingPassword, ...body },
    });
  expect((await withdrawing({ serials: [first] })).status).toBe(201);
  const except = verifyAnswer.parse((await ask(one.number, one.checkCode)).json);
  expect([except.state, except.withdrawnSerials]).toEqual(['valid-except', [first]]);
  expect(stateOf(await show(one.file))).toBe('valid-except');
  expect((await withdrawing({})).status).toBe(201);
  expect(stateOf(await ask(one.number, one.checkCode))).toBe('withdrawn');
  expect(stateOf(await show(one.file))).toBe('withdrawn');
  await inTransaction(null, (work) =>
    execute(
      work,
      `UPDATE certificates SET state = 'superseded', superseded_by = (SELECT id FROM certificates WHERE number = ?) WHERE number = ?`,
      [paper.number, one.number],
    ),
  );
  const superseded = verifyAnswer.parse((await ask(one.number, one.checkCode)).json);
  expect([superseded.state, superseded.replacedBy]).toEqual(['superseded', paper.number]);
});
