import { afterAll, beforeAll, expect, test } from 'vitest';
import { POST as evaluateRoute } from '@/app/api/evaluate/route';
import { closeDatabase } from '@/db/connection';
import { evaluation } from '@/services/contracts/evaluate';
import { call, person, type Person } from './inspection-setting';

let inspector: Person;

beforeAll(async () => {
  inspector = await person('inspector');
});
afterAll(closeDatabase);

const criteria = {
  characteristics: [{ number: '12', title: 'Wall', unit: 'mm', lower: '0.75', upper: '1.05', decision: { rule: 'simple' } }],
};

test('judges and stores nothing: a value on the limit conforms (acceptance.md N2)', async () => {
  const answer = await call(evaluateRoute, {
    method: 'POST',
    as: inspector,
    body: { criteria, observations: { readings: [{ characteristic: '12', value: '1.05', unit: 'mm' }] } },
  });
  expect(answer.status).toBe(200);
  expect(evaluation.parse(answer.json).verdict).toBe('accept');
});

test('every fault comes at once with the path of the body', async () => {
  const readings = [
    { characteristic: '12', value: '1,05', unit: 'mm' },
    { characteristic: '99', value: '1', unit: 'mm' },
  ];
  const answer = await call(evaluateRoute, {
    method: 'POST',
    as: inspector,
    body: { criteria, observations: { readings }, extra: 1 },
  });
  expect([answer.status, answer.problem]).toEqual([422, 'invalid-input']);
  expect(answer.errors.map(({ path }) => path)).toEqual(
    expect.arrayContaining(['observations.readings.0.value', 'observations.readings.1.characteristic', 'extra']),
  );
});

test('a guard band that leaves no zone is a fault at the uncertainty (R3)', async () => {
  const guarded = {
    characteristics: [
      { number: '12', title: 'Wall', unit: 'mm', lower: '0.75', upper: '1.05', decision: { rule: 'guarded', form: 'binary' } },
    ],
  };
  const readings = [{ characteristic: '12', value: '0.9', unit: 'mm', uncertainty: { expanded: '0.20', k: '2' } }];
  const answer = await call(evaluateRoute, {
    method: 'POST',
    as: inspector,
    body: { criteria: guarded, observations: { readings } },
  });
  expect(answer.status).toBe(422);
  expect(answer.errors[0]?.path).toContain('observations.readings.0.uncertainty');
});

test('malformed JSON 400, too large 413, no session 401, customer and auditor 403', async () => {
  const json = { 'content-type': 'application/json' };
  expect((await call(evaluateRoute, { method: 'POST', as: inspector, body: '{"criteria":', headers: json })).status).toBe(400);
  expect(
    (await call(evaluateRoute, { method: 'POST', as: inspector, body: `"${'x'.repeat(2 * 1024 * 1024)}"`, headers: json }))
      .status,
  ).toBe(413);
  expect((await call(evaluateRoute, { method: 'POST', body: {} })).status).toBe(401);
  for (const role of ['customer-quality', 'auditor'] as const)
    expect((await call(evaluateRoute, { method: 'POST', as: await person(role), body: {} })).status).toBe(403);
});
