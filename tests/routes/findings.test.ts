import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { GET as read } from '@/app/api/findings/[number]/route';
import { GET as list } from '@/app/api/findings/route';
import { closeDatabase } from '@/db/connection';
import { execute, inTransaction, reading, select, selectOne } from '@/db/work';
import { finding as findingShape, listFindings } from '@/services/contracts/findings';
import { canonicalJson } from '@/services/engine/record/canonical';
import { call, qualify, signingPassword, type Person } from './inspection-setting';
import { disposing, floor, partState, prepareFloor, rawPart, signPenetrant, signWall } from './release-setting';
import { bench, opened, requirementStates, saved, signing, wallContent } from './signing-setting';

beforeAll(prepareFloor);
afterAll(closeDatabase);

/** A part whose wall thickness was rejected, and the number of its finding. */
async function rejected(): Promise<{ id: string; serial: string; finding: string }> {
  const part = await rawPart();
  const { findings } = await signWall(part.id, '0.01');
  return { ...part, finding: findings[0]?.number ?? '' };
}

const finding = async (number: string) => findingShape.parse((await call(read, { as: bench.auditor, params: { number } })).json);

const events = (subject: string, id: string) =>
  select<{ kind: string }>(
    reading(),
    `SELECT e.kind FROM event_subjects s JOIN events e ON e.seq = s.event_seq WHERE s.subject_kind = ? AND s.subject_id = ? ORDER BY e.seq`,
    [subject, id],
  ).then((rows) => rows.map(({ kind }) => kind));

describe('a finding', () => {
  test('tells what failed, as entered, with its inspection and history', async () => {
    const part = await rejected();
    const one = await finding(part.finding);
    expect(one.failed.readings).toEqual([{ characteristic: '12', value: '0.01', unit: 'mm', verdict: 'reject' }]);
    expect([one.state, one.verdict, one.part.serial, one.requirement.key]).toEqual(['open', 'reject', part.serial, 'wall']);
    expect(one.inspection).toMatchObject({ signedBy: bench.inspector.name, verdict: 'reject' });
    expect(one.history).toHaveLength(1);
    expect(one.operations.map(({ key }) => key)).toEqual(['wall', 'fpi']);
  });

  test('is listed undecided first, each oldest first, page by page', async () => {
    const older = await rejected();
    const newer = await rejected();
    expect((await disposing(older.finding, { decision: 'refer' })).status).toBe(201);
    const numbers: string[] = [];
    let after = '';
    do {
      const page = listFindings.response.parse((await call(list, { as: bench.auditor, query: `?limit=100${after}` })).json);
      numbers.push(...page.items.map(({ number }) => number));
      after = page.next === null ? '' : `&after=${page.next}`;
    } while (after !== '');
    expect(new Set(numbers).size).toBe(numbers.length);
    expect(numbers.indexOf(newer.finding)).toBeGreaterThanOrEqual(0);
    expect(numbers.indexOf(older.finding)).toBeGreaterThan(numbers.indexOf(newer.finding));
  });

  test('is nothing to a customer, to a stranger, and under a number that does not exist', async () => {
    const { finding: number } = await rejected();
    expect((await call(read, { as: floor.customer, params: { number } })).status).toBe(403);
    expect((await call(list, { as: floor.customer })).status).toBe(403);
    expect((await call(read, { params: { number } })).status).toBe(401);
    expect((await call(read, { as: bench.auditor, params: { number: 'F-2026-99999' } })).status).toBe(404);
  });
});

describe('a disposition', () => {
  test('is refused without a session, by other roles, with a wrong password, on a finding that is not there', async () => {
    const { finding: number, id } = await rejected();
    const body = { decision: 'scrap' };
    expect((await disposing(number, body, null)).status).toBe(401);
    for (const who of [bench.inspector, bench.auditor, floor.administrator, floor.customer])
      expect((await disposing(number, body, who)).status).toBe(403);
    const wrong = await disposing(number, { ...body, password: 'not-mine' });
    expect([wrong.status, wrong.problem]).toEqual([403, 'signature-refused']);
    expect((await disposing('F-2026-99999', body)).status).toBe(404);
    const silent = await disposing(number, { ...body, reason: '' });
    expect([silent.status, silent.errors[0]?.path]).toEqual([422, 'reason']);
    expect([(await finding(number)).state, (await partState(id))?.state]).toEqual(['open', 'in-process']);
  });

  test('never accepts what stays outside the drawing', async () => {
    const { finding: number } = await rejected();
    for (const decision of ['use-as-is', 'repair']) {
      const answer = await disposing(number, { decision, scheme: 'WS-1' });
      expect([answer.status, answer.problem]).toEqual([403, 'not-permitted']);
      expect(answer.detail).toContain('concession');
    }
    expect((await disposing(number, { decision: 'accept' })).status).toBe(422);
    expect((await finding(number)).dispositions).toEqual([]);
  });

  test('is refused to the reviewer who signed the inspection', async () => {
    const reviewer = floor.second;
    await qualify(reviewer, 'ultrasonic-thickness');
    const part = await rawPart();
    const number = await signedBy(reviewer, part.id, '0.01');
    const own = await disposing(number, { decision: 'rework' }, reviewer);
    expect([own.status, own.problem]).toEqual([403, 'not-permitted']);
    expect((await disposing(number, { decision: 'rework' })).status).toBe(201);
  });

  test('rework opens the named operations again in their next cycle; the accepted repeat closes the finding', async () => {
    const part = await rawPart();
    await signPenetrant(part.id);
    const number = (await signWall(part.id, '0.01')).findings[0]?.number ?? '';
    const decided = await disposing(number, { decision: 'rework', repeat: ['wall', 'fpi'] });
    expect(decided.status).toBe(201);
    expect(findingShape.parse(decided.json)).toMatchObject({
      state: 'awaiting-follow-up',
      dispositions: [{ decision: 'rework', repeat: ['wall', 'fpi'], decidedBy: floor.reviewer.name }],
    });
    expect((await requirementStates(part.id)).map(({ state }) => state)).toEqual(['to-be-repeated', 'to-be-repeated']);
    const cycles = await select<{ cycle: number }>(
      reading(),
      'SELECT cycle FROM part_requirements WHERE part_id = ? ORDER BY position',
      [part.id],
    );
    expect(cycles).toEqual([{ cycle: 2 }, { cycle: 2 }]);
    expect((await partState(part.id))?.openFindings).toBe(1);
    await signPenetrant(part.id);
    expect((await finding(number)).state).toBe('awaiting-follow-up');
    await signWall(part.id);
    const closed = await finding(number);
    expect([closed.state, closed.history.map(({ verdict }) => verdict)]).toEqual(['closed', ['reject', 'accept']]);
    expect(await partState(part.id)).toMatchObject({ state: 'finished', openFindings: 0 });
    expect(await events('finding', closed.id)).toEqual([
      'inspection-signed',
      'finding-opened',
      'finding-dispositioned',
      'finding-closed',
    ]);
    expect((await disposing(number, { decision: 'scrap' })).problem).toBe('state-refused');
  });

  test('names an operation that is not in the route', async () => {
    const { finding: number } = await rejected();
    const answer = await disposing(number, { decision: 'rework', repeat: ['wall', 'etch'] });
    expect([answer.status, answer.errors[0]?.path]).toEqual([422, 'repeat.1']);
    expect((await finding(number)).state).toBe('open');
  });

  test('rework gives up what was measured before it', async () => {
    const part = await rejected();
    const draft = await opened('fpi', part.id);
    expect((await disposing(part.finding, { decision: 'rework', repeat: ['fpi'] })).status).toBe(201);
    expect((await signing(draft.id)).problem).toBe('state-refused');
    expect((await opened('fpi', part.id)).id).not.toBe(draft.id);
    expect(await events('inspection', draft.id)).toEqual(['inspection-opened', 'inspection-abandoned']);
  });

  test('re-interpretation asks for other eyes than the first', async () => {
    const part = await rejected();
    expect((await disposing(part.finding, { decision: 're-interpretation' })).status).toBe(201);
    expect((await requirementStates(part.id))[0]?.state).toBe('to-be-repeated');
    const again = await saved(await opened('wall', part.id), await wallContent('0.90', '0.90'));
    const own = await signing(again.id);
    expect([own.status, own.errors[0]?.path]).toEqual([422, 'signer']);
    expect((await finding(part.finding)).state).toBe('awaiting-follow-up');
    await qualify(floor.second, 'ultrasonic-thickness');
    const now = await opened('wall', part.id);
    await saved(now, await wallContent('0.90', '0.90', { person: floor.second.id }));
    expect((await signing(now.id, { as: floor.second })).status).toBe(201);
    expect((await finding(part.finding)).state).toBe('closed');
  });

  test('void ends the inspection, keeps its record, and repeats the operation', async () => {
    const part = await rejected();
    const before = await finding(part.finding);
    expect((await disposing(part.finding, { decision: 'void' })).status).toBe(201);
    const end = await selectOne(reading(), 'SELECT kind, ended_by AS endedBy FROM inspection_ends WHERE inspection_id = ?', [
      before.inspection?.id,
    ]);
    expect(end).toEqual({ kind: 'voided', endedBy: floor.reviewer.id });
    expect((await requirementStates(part.id))[0]?.state).toBe('to-be-repeated');
    expect((await finding(part.finding)).history).toHaveLength(1);
  });

  test('scrap is the end of the part', async () => {
    const part = await rejected();
    expect(findingShape.parse((await disposing(part.finding, { decision: 'scrap' })).json).state).toBe('closed');
    expect(await partState(part.id)).toMatchObject({ state: 'scrapped', openFindings: 0 });
  });

  test('refer waits for the customer', async () => {
    const part = await rejected();
    expect((await disposing(part.finding, { decision: 'refer' })).status).toBe(201);
    expect((await requirementStates(part.id))[0]?.state).toBe('rejected');
    expect(await finding(part.finding)).toMatchObject({ state: 'awaiting-follow-up', dispositions: [{ decision: 'refer' }] });
  });

  test('is kept as the canonical bytes and the sentence that were signed', async () => {
    const part = await rejected();
    await disposing(part.finding, { decision: 'scrap', reason: 'Too thin to be put right.' });
    const row = await selectOne<{ record: Buffer; digest: string; sentence: string }>(
      reading(),
      `SELECT s.record, s.record_digest AS digest, s.sentence FROM dispositions s JOIN findings f ON f.id = s.finding_id WHERE f.number = ?`,
      [part.finding],
    );
    const text = row?.record.toString('utf8') ?? '';
    expect(createHash('sha256').update(text).digest('hex')).toBe(row?.digest);
    expect(canonicalJson(JSON.parse(text))).toBe(text);
    expect(JSON.parse(text)).toMatchObject({ finding: part.finding, serial: part.serial, sentence: row?.sentence });
    expect(row?.sentence).toContain(`I, ${floor.reviewer.name}, decide finding ${part.finding} on serial ${part.serial}: scrap`);
    const change = inTransaction(null, (work) =>
      execute(work, `UPDATE dispositions SET reason = 'other' WHERE record_digest = ?`, [row?.digest]),
    );
    await expect(change).rejects.toThrow();
  });

  test('made twice at once with different decisions: the second is made on what the first left', async () => {
    for (let round = 0; round < 5; round += 1) {
      const part = await rejected();
      const [scrap, rework] = await Promise.all([
        disposing(part.finding, { decision: 'scrap' }),
        disposing(part.finding, { decision: 'rework' }, floor.signatory),
      ]);
      expect(scrap.status).toBe(201);
      expect([201, 409]).toContain(rework.status);
      expect(await partState(part.id)).toMatchObject({ state: 'scrapped', openFindings: 0 });
      const state = (await requirementStates(part.id))[0]?.state;
      expect(state).toBe(rework.status === 201 ? 'to-be-repeated' : 'rejected');
    }
  });
});

/** Signs a wall thickness as another person; answers the finding it opened. */
async function signedBy(who: Person, partId: string, first: string): Promise<string> {
  const draft = await saved(await opened('wall', partId), await wallContent(first, '0.90', { person: who.id }));
  const answer = await signing(draft.id, { as: who, body: { password: signingPassword } });
  expect(answer.errors).toEqual([]);
  return (answer.json as { findings: { number: string }[] }).findings[0]?.number ?? '';
}
