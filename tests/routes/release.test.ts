import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { POST as hold } from '@/app/api/holds/route';
import { closeDatabase } from '@/db/connection';
import { execute, inTransaction, reading, select, selectOne } from '@/db/work';
import { hold as holdShape } from '@/services/contracts/parts';
import { canonicalJson } from '@/services/engine/record/canonical';
import { certificateRecord } from '@/services/pdf/certificate-record';
import { call } from './inspection-setting';
import {
  dropJob,
  finishedPart,
  floor,
  heatLot,
  orderLine,
  orderedStatements,
  partState,
  prepareFloor,
  releaseAnswer,
  releasing,
  shipmentOf,
} from './release-setting';
import { bench } from './signing-setting';

beforeAll(prepareFloor);
afterAll(closeDatabase);

async function releasedOf(line: string): Promise<number | undefined> {
  const row = await selectOne<{ released: number }>(reading(), 'SELECT released FROM order_lines WHERE id = ?', [line]);
  return row?.released;
}

describe('a release', () => {
  test('is one signature: record, certificate, parts, order line, shipment, job and event together', async () => {
    const parts = [await finishedPart(), await finishedPart()];
    const line = await orderLine(3);
    const number = await shipmentOf(
      parts.map(({ serial }) => serial),
      line,
    );
    const answer = await releasing(number);
    expect(answer.status).toBe(201);
    const { certificate, job, sentence, serials } = releaseAnswer(answer);
    expect(certificate).toMatch(/^C-\d{4}-\d{5}$/);
    expect(serials).toEqual(parts.map(({ serial }) => serial).sort());
    for (const part of parts) expect(await partState(part.id)).toMatchObject({ state: 'released' });
    expect(await releasedOf(line)).toBe(2);
    const row = await selectOne<{
      record: Buffer;
      digest: string;
      sentence: string;
      code: string;
      state: string;
      shipment: string;
    }>(
      reading(),
      `SELECT r.record, r.record_digest AS digest, r.sentence, c.check_code AS code, c.state, s.state AS shipment FROM certificates c
       JOIN releases r ON r.id = c.release_id JOIN shipments s ON s.id = r.shipment_id WHERE c.number = ?`,
      [certificate],
    );
    expect([row?.state, row?.shipment, row?.sentence]).toEqual(['signed', 'packed', sentence]);
    // 26 characters of a 32-letter alphabet: 130 bits (ASVS 5.0 11.5.1 asks for 128).
    expect(row?.code.replaceAll('-', '')).toMatch(/^[A-Z2-9]{26}$/);
    const text = row?.record.toString('utf8') ?? '';
    expect(createHash('sha256').update(text).digest('hex')).toBe(row?.digest);
    expect(canonicalJson(JSON.parse(text))).toBe(text);
    const record = certificateRecord.parse(JSON.parse(text));
    expect(record.clauses).toEqual(orderedStatements);
    expect(record).toMatchObject({ number: certificate, quantity: 2, type31: true, signatory: { name: floor.signatory.name } });
    expect(record.serials.map((one) => one.inspections.map(({ result }) => result))).toEqual([
      ['accept', 'accept'],
      ['accept', 'accept'],
    ]);
    expect(await selectOne(reading(), 'SELECT kind, state FROM jobs WHERE id = ?', [job])).toMatchObject({
      kind: 'issue-certificate',
    });
    const told = await select<{ kind: string }>(
      reading(),
      `SELECT e.kind FROM event_subjects s JOIN events e ON e.seq = s.event_seq WHERE s.subject_kind = 'part' AND s.subject_id = ? ORDER BY e.seq DESC LIMIT 1`,
      [parts[0]?.id],
    );
    expect(told).toEqual([{ kind: 'release-signed' }]);
    await dropJob(job);
  });

  test('is refused without a session, without the authority, and with a wrong password', async () => {
    const part = await finishedPart();
    const number = await shipmentOf([part.serial]);
    expect((await releasing(number, null)).status).toBe(401);
    for (const who of [bench.inspector, bench.auditor, floor.administrator, floor.reviewer, floor.customer]) {
      const refused = await releasing(number, who);
      expect([refused.status, refused.problem]).toEqual([403, 'not-permitted']);
    }
    expect((await releasing(number, floor.signatory, { password: 'not-mine' })).problem).toBe('signature-refused');
    expect((await releasing('S-2026-99999')).status).toBe(404);
    expect((await partState(part.id))?.state).toBe('finished');
  });

  test('is one, however often the button is pressed; the same key gets the same answer', async () => {
    const part = await finishedPart();
    const number = await shipmentOf([part.serial]);
    const key = `release-${part.id}`;
    const first = await releasing(number, floor.signatory, { key });
    const replay = await releasing(number, floor.signatory, { key });
    expect([first.status, replay.status, replay.json]).toEqual([201, 201, first.json]);
    const again = await releasing(number);
    const { certificate, job } = releaseAnswer(first);
    expect([again.status, again.problem]).toEqual([409, 'state-refused']);
    expect(again.json).toMatchObject({ certificate });
    expect(again.detail).toContain(certificate);
    await dropJob(job);
  });
});

test('two simultaneous releases of one part: one wins, fifty times', async () => {
  const line = await orderLine(200);
  for (let round = 0; round < 50; round += 1) {
    const part = await finishedPart();
    const number = await shipmentOf([part.serial], line);
    const answers = await Promise.all([releasing(number, floor.signatory), releasing(number, floor.second)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409]);
    const lost = answers.find(({ status }) => status === 409);
    const won = releaseAnswer(answers.find(({ status }) => status === 201) ?? answers[0]);
    expect([lost?.problem, lost?.detail.includes(won.certificate)]).toEqual(['state-refused', true]);
    expect(await select(reading(), 'SELECT release_id FROM release_parts WHERE part_id = ?', [part.id])).toHaveLength(1);
    await dropJob(won.job);
  }
  expect(await releasedOf(line)).toBe(50);
}, 240_000);

test('two shipments for the last open piece of an order line: one wins', async () => {
  for (let round = 0; round < 10; round += 1) {
    const line = await orderLine(1);
    const parts = [await finishedPart(), await finishedPart()];
    const numbers = await Promise.all(parts.map(({ serial }) => shipmentOf([serial], line)));
    const answers = await Promise.all([releasing(numbers[0] ?? ''), releasing(numbers[1] ?? '', floor.second)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409]);
    expect(answers.find(({ status }) => status === 409)?.errors.map(({ path }) => path)).toEqual(['shipment']);
    expect(await releasedOf(line)).toBe(1);
    const won = answers.find(({ status }) => status === 201);
    if (won) await dropJob(releaseAnswer(won).job);
  }
}, 240_000);

test('a hold against a release: the release sees it, or the hold lists the recall; never neither, fifty times', async () => {
  const seen = { release: 0, hold: 0 };
  for (let round = 0; round < 50; round += 1) {
    const heat = await heatLot();
    const part = await finishedPart(heat);
    const number = await shipmentOf([part.serial]);
    const target = round % 2 === 0 ? { kind: 'lot', id: heat } : { kind: 'part', id: part.id };
    // The password's check takes the release some 50 ms; the hold is placed somewhere in and around that.
    const placing = new Promise((begin) => setTimeout(begin, (round * 7) % 90)).then(() =>
      call(hold, { method: 'POST', as: bench.inspector, body: { target, reason: 'Laboratory called.' } }),
    );
    const [release, placed] = await Promise.all([releasing(number), placing]);
    expect(placed.status).toBe(201);
    const { recall } = holdShape.parse(placed.json);
    expect((await partState(part.id))?.held).toBe(1);
    if (release.status === 201) {
      const { certificate, job } = releaseAnswer(release);
      expect(recall.map((one) => [one.serial, one.certificate])).toEqual([[part.serial, certificate]]);
      seen.release += 1;
      await dropJob(job);
    } else {
      expect([release.problem, recall]).toEqual(['gates-closed', []]);
      expect(release.errors.every(({ message }) => message.startsWith('hold '))).toBe(true);
      expect((await partState(part.id))?.state).toBe('finished');
      seen.hold += 1;
    }
  }
  // Otherwise the two never met and the trial shows nothing.
  expect(Math.min(seen.release, seen.hold)).toBeGreaterThan(0);
}, 240_000);

test('the application itself cannot change a signed release', async () => {
  const part = await finishedPart();
  const { job } = releaseAnswer(await releasing(await shipmentOf([part.serial])));
  await dropJob(job);
  for (const sql of [
    `UPDATE releases SET sentence = 'other' WHERE id = (SELECT release_id FROM release_parts WHERE part_id = ?)`,
    'DELETE FROM release_parts WHERE part_id = ?',
  ])
    await expect(inTransaction(null, (work) => execute(work, sql, [part.id]))).rejects.toThrow();
});
