import { beforeAll, describe, expect, it } from 'vitest';
import { GET as record } from '@/app/api/record/route';
import { POST as hold } from '@/app/api/holds/route';
import { listRecord } from '@/services/contracts/trace';
import { call, partOf, person, setting, type Person } from './inspection-setting';

let auditor: Person;
let reviewer: Person;
let part: string;

beforeAll(async () => {
  auditor = await person('auditor');
  reviewer = await person('reviewer');
  part = await partOf(await setting(reviewer), reviewer);
});

const read = async (query: string) => listRecord.response.parse((await call(record, { as: auditor, query })).json);

describe('the journal', () => {
  it('shows a change that was just made, with who made it', async () => {
    const reason = 'found on the floor of the cleaning room';
    await call(hold, { method: 'POST', as: reviewer, body: { target: { kind: 'part', id: part }, reason } });
    const { items } = await read('?limit=200');
    const told = items.find(({ subject, kind }) => kind === 'hold-placed' && subject.id === part);
    expect([told?.actor?.name, told?.details.reason]).toEqual([reviewer.name, reason]);
    expect(told?.digest).toMatch(/^[0-9a-f]{64}$/);
  });

  it('pages newest first, without losing or repeating an entry', async () => {
    for (const reason of ['first reason', 'second reason', 'third reason'])
      await call(hold, { method: 'POST', as: reviewer, body: { target: { kind: 'part', id: part }, reason } });
    const first = await read('?limit=2');
    const second = await read(`?limit=2&after=${first.next ?? ''}`);
    const places = [...first.items, ...second.items].map(({ seq }) => seq);
    expect(places).toHaveLength(4);
    expect(places).toEqual([...new Set(places)].sort((a, b) => b - a));
  });

  it('refuses a key that is not its own', async () => {
    const forged = Buffer.from('["here"]').toString('base64url');
    for (const after of ['zzz', forged]) {
      const answer = await call(record, { as: auditor, query: `?after=${after}` });
      expect([answer.status, answer.errors.map(({ path }) => path)]).toEqual([422, ['after']]);
    }
  });

  it('is not for strangers, inspectors and customers', async () => {
    expect((await call(record, {})).status).toBe(401);
    expect((await call(record, { as: await person('inspector') })).status).toBe(403);
    expect((await call(record, { as: await person('customer-quality', null) })).status).toBe(403);
  });
});
