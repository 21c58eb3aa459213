import { beforeAll, describe, expect, it } from 'vitest';
import { POST as lift } from '@/app/api/holds/[id]/lift/route';
import { POST as place } from '@/app/api/holds/route';
import { GET as trace } from '@/app/api/trace/[partId]/route';
import { hold as holdShape } from '@/services/contracts/parts';
import { readTrace } from '@/services/contracts/trace';
import { microseconds } from '@/services/trace/as-recorded-by';
import { call, partOf, signingPassword } from './inspection-setting';
import { finishedPart, floor, prepareFloor, rawPart, released, signWall } from './release-setting';
import { bench } from './signing-setting';

beforeAll(prepareFloor);

const traced = async (partId: string, query = '') => {
  const answer = await call(trace, { as: bench.auditor, params: { partId }, query });
  expect(answer.status).toBe(200);
  return readTrace.response.parse(answer.json);
};
const by = (instant: string) => `?recordedBy=${encodeURIComponent(instant)}`;

/** One microsecond before an instant with six digits. */
function justBefore(instant: string): string {
  const [, whole = '', micros = ''] = /^(.*)\.(\d{6})Z$/.exec(instant) ?? [];
  if (micros === '000000') throw new Error('the instant fell on a whole second');
  return `${whole}.${String(Number(micros) - 1).padStart(6, '0')}Z`;
}

describe('the history of a released part', () => {
  it('leads from the serial to people, gauge, files, heat, shipment and certificate', async () => {
    const part = await finishedPart();
    const { certificate } = await released([part]);
    const told = await traced(part.id);
    expect(told.inspections.map(({ verdict, people, equipment }) => [verdict, people, equipment.length])).toEqual([
      ['accept', [bench.inspector.name], 1],
      ['accept', [bench.inspector.name], 1],
    ]);
    expect(told.inspections[1]?.evidence.map(({ id, kind }) => [id, kind])).toEqual([[floor.photograph, 'photograph']]);
    const [cluster, heat] = told.genealogy;
    expect([cluster?.kind, cluster?.parents, heat?.id, heat?.attributes]).toEqual([
      'cluster',
      [floor.heat],
      floor.heat,
      { alloyCertificate: 'AC-1' },
    ]);
    expect(told.certificates.map(({ number, signedBy }) => [number, signedBy])).toEqual([[certificate, floor.signatory.name]]);
    expect(told.part.shipment).toBe(told.certificates[0]?.shipment);
    const kinds = told.events.map(({ kind }) => kind);
    expect(kinds.filter((kind) => kind === 'inspection-signed')).toHaveLength(2);
    expect(kinds).toContain('release-signed');
    const places = told.events.map(({ seq }) => seq);
    expect(places).toEqual([...new Set(places)].sort((a, b) => a - b));
  });

  it('keeps what happened to other castings of the heat out of the journal', async () => {
    const mine = await rawPart();
    const other = await rawPart();
    const target = { kind: 'part', id: other.id };
    await call(place, { method: 'POST', as: floor.reviewer, body: { target, reason: 'dropped on the floor' } });
    const told = await traced(mine.id);
    expect(told.events.some(({ kind }) => kind === 'hold-placed')).toBe(false);
    expect(told.holds).toEqual([]);
  });
});

describe('as recorded by an instant', () => {
  it('leaves out a reject, its finding and its event a microsecond before they were recorded', async () => {
    const { id } = await rawPart();
    await signWall(id, '0.01');
    const now = await traced(id);
    const [inspection] = now.inspections;
    expect(now.findings.map(({ state, dispositions }) => [state, dispositions])).toEqual([['open', []]]);
    if (!inspection) throw new Error('the reject is not in the history');
    const then = await traced(id, by(inspection.signedAt));
    expect([then.inspections.length, then.findings.length]).toEqual([1, 1]);
    const before = await traced(id, by(justBefore(inspection.signedAt)));
    expect([before.inspections, before.findings, before.part.findings]).toEqual([[], [], []]);
    expect(before.events.some(({ kind }) => kind === 'inspection-signed')).toBe(false);
    expect(before.genealogy.length).toBe(now.genealogy.length);
  });

  it('shows a hold that was lifted later as standing', async () => {
    const { id } = await rawPart();
    const body = { target: { kind: 'part', id }, reason: 'wrong core lot suspected' };
    const hold = holdShape.parse((await call(place, { method: 'POST', as: floor.reviewer, body })).json);
    const signed = { reason: 'core lot confirmed', password: signingPassword };
    await call(lift, { method: 'POST', as: floor.reviewer, params: { id: hold.id }, body: signed });
    expect((await traced(id)).holds.map(({ liftedReason }) => liftedReason)).toEqual(['core lot confirmed']);
    const then = await traced(id, by(hold.placedAt));
    expect(then.holds.map(({ number, liftedAt, liftedBy }) => [number, liftedAt, liftedBy])).toEqual([[hold.number, null, null]]);
    expect((await traced(id, by(justBefore(hold.placedAt)))).holds).toEqual([]);
  });

  it('shows nothing but the castings’ origin before anything was recorded', async () => {
    const id = await partOf(bench.plan, bench.inspector);
    const told = await traced(id, by('2001-01-01T00:00:00Z'));
    expect([told.inspections, told.findings, told.holds, told.certificates, told.genealogy, told.events]).toEqual(
      Array.from({ length: 6 }, () => []),
    );
  });

  // Texts of different lengths do not sort as instants: '…:05Z' is after '…:05.5Z' by characters.
  it.each([
    ['2026-03-09T14:05:06Z', '2026-03-09T14:05:06.000000Z'],
    ['2026-03-09T14:05:06.5Z', '2026-03-09T14:05:06.500000Z'],
    ['2026-03-09T14:05:06.1234567Z', '2026-03-09T14:05:06.123456Z'],
  ])('reads %s as %s', (iso, expected) => {
    expect(microseconds(iso)).toBe(expected);
  });

  it('names a time that is none', async () => {
    const { id } = await rawPart();
    const answer = await call(trace, { as: bench.auditor, params: { partId: id }, query: by('yesterday') });
    expect([answer.status, answer.errors[0]?.path]).toEqual([422, 'recordedBy']);
  });
});

describe('who may trace', () => {
  it('refuses strangers and customers, their own part included', async () => {
    const { id } = await rawPart();
    expect((await call(trace, { params: { partId: id } })).status).toBe(401);
    for (const as of [floor.customer, floor.stranger])
      expect((await call(trace, { as, params: { partId: id } })).status).toBe(403);
  });

  it('answers 404 for a part that does not exist', async () => {
    const params = { partId: '01900000-0000-7000-8000-000000000001' };
    expect((await call(trace, { as: bench.auditor, params })).status).toBe(404);
  });
});
