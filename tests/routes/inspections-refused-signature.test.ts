import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { GET as read } from '@/app/api/inspections/[id]/route';
import { closeDatabase } from '@/db/connection';
import { databaseNow, inTransaction, reading, select } from '@/db/work';
import { inspection } from '@/services/contracts/inspections';
import { call, gauge, partOf, person, qualify, recordCheck, setting } from './inspection-setting';
import { bench, opened, prepareBench, requirementStates, saved, signing, wallContent } from './signing-setting';

beforeAll(prepareBench);
afterAll(closeDatabase);

describe('refusals', () => {
  test('an empty draft: every reason at once, and nothing is written', async () => {
    const draft = await opened('fpi');
    const answer = await signing(draft.id);
    expect([answer.status, answer.problem]).toEqual([422, 'not-signable']);
    expect(answer.errors.map(({ path }) => path).sort()).toEqual([
      'acts.evaluated',
      'acts.processed',
      'evidence.photograph',
      'examined',
      'missing.attribute.40',
      'missing.method.penetrant',
      'missing.process.P3',
    ]);
    const rows = await select(reading(), 'SELECT id FROM inspections WHERE id = ?', [draft.id]);
    expect(rows).toEqual([]);
    const now = inspection.parse((await call(read, { as: bench.inspector, params: { id: draft.id } })).json);
    expect([now.state, now.version]).toEqual(['draft', draft.version]);
  });

  test('typed faults, a closing block reading out of tolerance, a gauge out of calibration, a person not authorised', async () => {
    const stranger = await person('inspector');
    const overdue = await gauge('ultrasonic-thickness', 'ut-gauge', -1);
    const draft = await saved(
      await opened('wall'),
      await wallContent('1,2,3', '0.90', { block: '0.97', equipment: [overdue], person: stranger.id }),
    );
    const answer = await signing(draft.id);
    expect(answer.status).toBe(422);
    const paths = answer.errors.map(({ path }) => path);
    expect(paths).toContain('readings.0.value');
    expect(paths).toContain('missing.reading.12');
    expect(paths).toContain('acts.block-check-after.values.1.00');
    expect(paths).toContain('acts.1.equipment.0');
    const whys = answer.errors
      .filter(({ path }) => path === 'acts.1.person')
      .map(({ message }) => message)
      .join('; ');
    expect(whys).toContain('is not authorised');
    expect(whys).toContain('no near vision test');
    expect(whys).toContain('signs');
  });

  test.each([
    ['level 1', '1', 30, 'level 2 or 3 is needed'],
    ['near vision 400 days old', '2', 400, 'older than 12 months'],
  ] as const)('%s', async (_name, level, daysAgo, words) => {
    const who = await person('inspector');
    await qualify(who, 'ultrasonic-thickness', level, daysAgo);
    const draft = await saved(await opened('wall'), await wallContent('0.90', '0.90', { person: who.id }));
    const answer = await signing(draft.id, { as: who });
    expect([answer.status, answer.errors.length]).toEqual([422, 1]);
    expect(answer.errors[0]?.message).toContain(words);
  });

  test('a process check that failed before the act does not cover it', async () => {
    const other = await setting(bench.inspector);
    const partId = await partOf(other, bench.inspector);
    await inTransaction(null, (work) => recordCheck(work, other.line, 'failed'));
    const at = await databaseNow();
    const acts = [
      { kind: 'processed', person: bench.inspector.id, at },
      { kind: 'evaluated', person: bench.inspector.id, at, equipment: [bench.lamp] },
    ];
    const answer = await signing((await saved(await opened('fpi', partId), { acts })).id);
    expect(answer.errors.filter(({ path }) => path.includes('.checks.')).map(({ message }) => message)).toEqual([
      `the process check of ${other.line} (Known-defect panel) had failed before the act`,
      `the process check of ${other.line} (Known-defect panel) had failed before the act`,
    ]);
  });

  test('a wrong password signs nothing; a version that moved is shown first', async () => {
    const draft = await saved(await opened('wall'), await wallContent('0.90', '0.90'));
    const wrong = await signing(draft.id, { body: { password: 'not mine' } });
    expect([wrong.status, wrong.problem]).toEqual([403, 'signature-refused']);
    const moved = await signing(draft.id, { headers: { 'if-match': `"${String(draft.version - 1)}"` } });
    expect([moved.status, moved.problem]).toEqual([412, 'changed-meanwhile']);
    expect((await requirementStates(draft.part.id))[0]?.state).toBe('in-work');
  });

  test('no session 401, auditor and administrator 403, nothing there 404', async () => {
    const draft = await opened('wall');
    expect((await signing(draft.id, { as: null })).status).toBe(401);
    expect((await signing(draft.id, { as: bench.auditor })).status).toBe(403);
    expect((await signing(draft.id, { as: await person('administrator') })).status).toBe(403);
    expect((await signing(bench.plan.planId)).status).toBe(404);
  });
});
