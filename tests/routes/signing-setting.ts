import { PATCH as change } from '@/app/api/inspections/[id]/route';
import { POST as sign } from '@/app/api/inspections/[id]/signature/route';
import { POST as open } from '@/app/api/inspections/route';
import { databaseNow, reading, select } from '@/db/work';
import { inspection, type InspectionAnswer } from '@/services/contracts/inspections';
import { expect } from 'vitest';
import {
  call,
  gauge,
  partOf,
  person,
  qualify,
  setting,
  signingPassword,
  type Answer,
  type Person,
  type Setting,
} from './inspection-setting';

interface Bench {
  inspector: Person;
  auditor: Person;
  plan: Setting;
  equipment: string;
  lamp: string;
}

/** Who and what the signing tests share; filled by `prepareBench`. */
export const bench = {} as Bench;

/** A level-2 inspector for both operations of a plan, with a gauge and a lamp in calibration. */
export async function prepareBench(): Promise<void> {
  bench.inspector = await person('inspector');
  bench.auditor = await person('auditor');
  bench.plan = await setting(bench.inspector);
  bench.equipment = await gauge('ultrasonic-thickness', 'ut-gauge');
  bench.lamp = await gauge('penetrant', 'uv-a-lamp');
  await qualify(bench.inspector, 'ultrasonic-thickness');
  await qualify(bench.inspector, 'penetrant');
}

export async function opened(requirement: 'wall' | 'fpi', partId?: string): Promise<InspectionAnswer> {
  const subject = { part: partId ?? (await partOf(bench.plan, bench.inspector)) };
  return inspection.parse((await call(open, { method: 'POST', as: bench.inspector, body: { subject, requirement } })).json);
}

export async function saved(draft: InspectionAnswer, body: unknown): Promise<InspectionAnswer> {
  const answer = await call(change, {
    method: 'PATCH',
    as: bench.inspector,
    params: { id: draft.id },
    headers: { 'if-match': `"${String(draft.version)}"` },
    body,
  });
  expect(answer.status).toBe(200);
  return inspection.parse(answer.json);
}

export async function wallContent(
  first: string,
  second: string,
  more: { block?: string; equipment?: string[]; person?: string } = {},
) {
  const at = await databaseNow();
  const who = more.person ?? bench.inspector.id;
  return {
    readings: [
      { characteristic: '12', value: first, unit: 'mm' },
      { characteristic: '13', value: second, unit: 'mm' },
    ],
    acts: [
      { kind: 'block-check-before', person: who, at, values: { '1.00': '1.01' } },
      { kind: 'measured', person: who, at, equipment: more.equipment ?? [bench.equipment] },
      { kind: 'block-check-after', person: who, at, values: { '1.00': more.block ?? '0.98' } },
    ],
  };
}

export function signing(
  id: string,
  more: { as?: Person | null; headers?: Record<string, string>; body?: unknown } = {},
): Promise<Answer> {
  const as = more.as === undefined ? bench.inspector : more.as;
  return call(sign, {
    method: 'POST',
    params: { id },
    body: more.body ?? { password: signingPassword },
    headers: more.headers ?? {},
    ...(as ? { as } : {}),
  });
}

export function requirementStates(partId: string) {
  return select<{ state: string; inspectionId: string | null }>(
    reading(),
    'SELECT state, inspection_id AS inspectionId FROM part_requirements WHERE part_id = ? ORDER BY position',
    [partId],
  );
}
