import { createHash } from 'node:crypto';
import sharp from 'sharp';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { GET as read, PATCH as change } from '@/app/api/inspections/[id]/route';
import { POST as admit } from '@/app/api/evidence/route';
import { PUT as link } from '@/app/api/inspections/[id]/evidence/[evidenceId]/route';
import { POST as abandon } from '@/app/api/inspections/[id]/abandonment/route';
import { POST as open } from '@/app/api/inspections/route';
import { closeDatabase } from '@/db/connection';
import { readingsOfInspection } from '@/db/repositories/inspections';
import { databaseNow, reading, select, selectOne } from '@/db/work';
import { evidenceFile } from '@/services/contracts/evidence';
import { inspection, signInspection } from '@/services/contracts/inspections';
import { canonicalJson } from '@/services/engine/record/canonical';
import { call, signingPassword } from './inspection-setting';

import { bench, opened, prepareBench, requirementStates, saved, signing, wallContent } from './signing-setting';

beforeAll(prepareBench);
afterAll(closeDatabase);

describe('a good inspection', () => {
  test('is signed: record, readings, requirement, counters, journal', async () => {
    const draft = await saved(await opened('wall'), await wallContent('0.10', '0.900'));
    const answer = await signing(draft.id, { headers: { 'if-match': `"${String(draft.version)}"` } });
    expect(answer.errors).toEqual([]);
    expect(answer.status).toBe(201);
    const signed = signInspection.response.parse(answer.json);
    expect(signed.number).toMatch(/^I-\d{4}-\d{5}$/);
    expect([signed.verdict, signed.findings]).toEqual(['accept', []]);
    expect(signed.sentence).toContain(`I, ${bench.inspector.name}, inspected serial ${draft.part.serial}`);
    expect((await readingsOfInspection(reading(), draft.id)).map(({ value }) => value)).toEqual(['0.10', '0.900']);
    expect(await requirementStates(draft.part.id)).toEqual([
      { state: 'met', inspectionId: draft.id },
      { state: 'open', inspectionId: null },
    ]);
    const part = await selectOne(reading(), 'SELECT met_count AS met, next_requirement AS next, state FROM parts WHERE id = ?', [
      draft.part.id,
    ]);
    expect(part).toEqual({ met: 1, next: 'Fluorescent penetrant', state: 'in-process' });
    const events = await select<{ kind: string }>(
      reading(),
      `SELECT e.kind FROM event_subjects s JOIN events e ON e.seq = s.event_seq WHERE s.subject_kind = 'part' AND s.subject_id = ? ORDER BY e.seq`,
      [draft.part.id],
    );
    expect(events.map(({ kind }) => kind)).toEqual(['inspection-opened', 'inspection-signed']);
  });

  test('its record is canonical, hashed as stored, and copies what counted', async () => {
    const draft = await saved(await opened('wall'), await wallContent('0.10', '0.900'));
    expect((await signing(draft.id)).status).toBe(201);
    const row = await selectOne<{ record: Buffer; digest: string }>(
      reading(),
      'SELECT record, record_digest AS digest FROM inspections WHERE id = ?',
      [draft.id],
    );
    const text = row?.record.toString('utf8') ?? '';
    expect(
      createHash('sha256')
        .update(row?.record ?? '')
        .digest('hex'),
    ).toBe(row?.digest);
    expect(canonicalJson(JSON.parse(text))).toBe(text);
    expect(JSON.parse(text)).toMatchObject({
      schema: 1,
      subject: { serial: draft.part.serial },
      content: { readings: [{ value: '0.10' }, { value: '0.900' }] },
      observations: { readings: [{ uncertainty: { expanded: '0.020', k: '2' } }, {}] },
      acts: [
        { authorisation: null },
        {
          authorisation: { level: '2' },
          vision: { near: { result: 'pass' }, colour: { result: 'pass' } },
          equipment: [{ id: bench.equipment, asLeft: 'good' }],
        },
        {},
      ],
    });
    const shown = inspection.parse((await call(read, { as: bench.auditor, params: { id: draft.id } })).json);
    expect([shown.state, shown.signed?.recordDigest, shown.judgement.evaluation?.verdict]).toEqual([
      'signed',
      row?.digest,
      'accept',
    ]);
  });

  test('a clean penetrant inspection is signed once its photograph is attached, and the record names the file', async () => {
    const at = await databaseNow();
    const draft = await saved(await opened('fpi'), {
      process: [{ number: 'P3', value: '25', unit: 'min' }],
      attributes: [{ number: '40', result: 'conforming' }],
      examined: true,
      acts: [
        { kind: 'processed', person: bench.inspector.id, at },
        { kind: 'evaluated', person: bench.inspector.id, at, equipment: [bench.lamp] },
      ],
    });
    expect((await signing(draft.id)).errors.map(({ path }) => path)).toEqual(['evidence.photograph']);
    const colour = { r: Number(draft.id.charCodeAt(35)), g: Number(draft.id.charCodeAt(34)), b: 7 };
    const body = new Uint8Array(
      await sharp({ create: { width: 20, height: 20, channels: 3, background: colour } })
        .png()
        .toBuffer(),
    );
    const file = evidenceFile.parse(
      (await call(admit, { method: 'POST', as: bench.inspector, query: '?kind=photograph&name=seen.png', body })).json,
    );
    const params = { id: draft.id, evidenceId: file.id };
    expect(
      (await call(link, { method: 'PUT', as: bench.inspector, params, body: { role: 'photograph', view: 'concave' } })).status,
    ).toBe(200);
    const answer = await signing(draft.id);
    expect(answer.errors).toEqual([]);
    expect(signInspection.response.parse(answer.json).verdict).toBe('accept');
    const row = await selectOne<{ record: Buffer }>(reading(), 'SELECT record FROM inspections WHERE id = ?', [draft.id]);
    expect(JSON.parse(row?.record.toString('utf8') ?? '{}')).toMatchObject({
      evidence: [{ sha256: file.sha256, role: 'photograph', view: 'concave' }],
    });
    const late = await call(link, { method: 'PUT', as: bench.inspector, params, body: { role: 'document' } });
    expect([late.status, late.problem]).toEqual([409, 'state-refused']);
  });

  test('fifty signatures at once make exactly one inspection', async () => {
    const draft = await saved(await opened('wall'), await wallContent('0.90', '0.90'));
    const answers = await Promise.all(
      Array.from({ length: 50 }, () => signing(draft.id, { body: { pin: signingPassword.slice(0, 20) } })),
    );
    const won = answers.filter(({ status }) => status === 201);
    expect(won).toHaveLength(1);
    expect(answers.filter(({ status }) => status === 409)).toHaveLength(49);
    const number = signInspection.response.parse(won[0]?.json).number;
    expect(answers.filter(({ status }) => status === 409).every(({ detail }) => detail.includes(number))).toBe(true);
    const rows = await select<{ n: number }>(reading(), 'SELECT COUNT(*) AS n FROM inspections WHERE part_id = ?', [
      draft.part.id,
    ]);
    expect(rows[0]?.n).toBe(1);
  }, 120_000);

  test('the same Idempotency-Key twice is one signature with one answer', async () => {
    const draft = await saved(await opened('wall'), await wallContent('0.90', '0.90'));
    const headers = { 'idempotency-key': `sign-${draft.id}` };
    const [first, second] = [await signing(draft.id, { headers }), await signing(draft.id, { headers })];
    expect([first.status, second.status]).toEqual([201, 201]);
    expect(second.json).toEqual(first.json);
  });
});

test('a save and a signature at once: the record holds what was saved, or the save is refused', async () => {
  for (let round = 0; round < 10; round += 1) {
    const draft = await saved(await opened('wall'), await wallContent('0.90', '0.90'));
    const save = call(change, {
      method: 'PATCH',
      as: bench.inspector,
      params: { id: draft.id },
      headers: { 'if-match': `"${String(draft.version)}"` },
      body: { notes: 'saved last' },
    });
    const [kept, signed] = await Promise.all([save, signing(draft.id, { body: { pin: signingPassword } })]);
    expect(signed.status).toBe(201);
    const now = inspection.parse((await call(read, { as: bench.auditor, params: { id: draft.id } })).json);
    expect([kept.status, now.content.notes]).toEqual(kept.status === 200 ? [200, 'saved last'] : [409, '']);
  }
});

describe('inspecting a met requirement again', () => {
  test('needs a reason; giving up puts it back to met', async () => {
    const draft = await saved(await opened('wall'), await wallContent('0.90', '0.90'));
    expect((await signing(draft.id)).status).toBe(201);
    const body = { subject: { part: draft.part.id }, requirement: 'wall' };
    const refused = await call(open, { method: 'POST', as: bench.inspector, body });
    expect([refused.status, refused.errors[0]?.path]).toEqual([409, 'repeatReason']);
    const again = inspection.parse(
      (await call(open, { method: 'POST', as: bench.inspector, body: { ...body, repeatReason: 're-measure' } })).json,
    );
    expect([again.repeatReason, again.requirement.state]).toEqual(['re-measure', 'in-work']);
    const gone = inspection.parse(
      (await call(abandon, { method: 'POST', as: bench.inspector, params: { id: again.id }, body: {} })).json,
    );
    expect([gone.state, gone.requirement.state]).toEqual(['abandoned', 'met']);
  });
});

describe('a bad one', () => {
  test('a reject opens a finding, counts it, and is not inspected again without a disposition', async () => {
    const draft = await saved(await opened('wall'), await wallContent('0.01', '0.90'));
    const signed = signInspection.response.parse((await signing(draft.id)).json);
    expect(signed.verdict).toBe('reject');
    expect(signed.findings[0]?.number).toMatch(/^F-\d{4}-\d{5}$/);
    expect((await requirementStates(draft.part.id))[0]?.state).toBe('rejected');
    const part = await selectOne(reading(), 'SELECT open_findings AS open FROM parts WHERE id = ?', [draft.part.id]);
    expect(part).toEqual({ open: 1 });
    const again = await call(open, {
      method: 'POST',
      as: bench.inspector,
      body: { subject: { part: draft.part.id }, requirement: 'wall', repeatReason: 're-measure' },
    });
    expect([again.status, again.problem]).toEqual([409, 'state-refused']);
    expect(again.detail).toContain('disposition');
  });

  test('an undecided reading waits for a decision', async () => {
    const draft = await saved(await opened('wall'), await wallContent('0.90', '0.76'));
    const signed = signInspection.response.parse((await signing(draft.id)).json);
    expect([signed.verdict, signed.findings.length]).toEqual(['indeterminate', 1]);
    expect((await requirementStates(draft.part.id))[0]?.state).toBe('awaiting-decision');
  });

  test('a process value outside its window voids: to be repeated, no finding', async () => {
    const at = await databaseNow();
    const draft = await saved(await opened('fpi'), {
      process: [{ number: 'P3', value: '5', unit: 'min' }],
      examined: true,
      attributes: [{ number: '40', result: 'conforming' }],
      acts: [
        { kind: 'processed', person: bench.inspector.id, at },
        { kind: 'evaluated', person: bench.inspector.id, at, equipment: [bench.lamp] },
      ],
    });
    const signed = signInspection.response.parse((await signing(draft.id)).json);
    expect([signed.verdict, signed.findings]).toEqual(['not-evaluable', []]);
    expect((await requirementStates(draft.part.id))[1]?.state).toBe('to-be-repeated');
  });

  test('a crack seen in a void inspection opens a finding all the same', async () => {
    const at = await databaseNow();
    const draft = await saved(await opened('fpi'), {
      process: [{ number: 'P3', value: '5', unit: 'min' }],
      examined: true,
      indications: [
        {
          id: '1',
          type: 'crack',
          view: 'concave',
          shape: {
            kind: 'polyline',
            points: [
              [3000, 3000],
              [5000, 3500],
            ],
            width: 100,
          },
        },
      ],
      acts: [
        { kind: 'processed', person: bench.inspector.id, at },
        { kind: 'evaluated', person: bench.inspector.id, at, equipment: [bench.lamp] },
      ],
    });
    expect(signInspection.response.parse((await signing(draft.id)).json).findings).toHaveLength(1);
  });
});
