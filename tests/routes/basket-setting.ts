import { expect } from 'vitest';
import { POST as scanRoute } from '@/app/api/baskets/[id]/parts/route';
import { GET as read } from '@/app/api/baskets/[id]/route';
import { POST as signRoute } from '@/app/api/baskets/[id]/signature/route';
import { POST as openRoute } from '@/app/api/baskets/route';
import { PATCH as saveDraft } from '@/app/api/inspections/[id]/route';
import { newId } from '@/db/identity';
import { insert, insertAll } from '@/db/models/table';
import { planById, planIssues, requirements } from '@/db/repositories/plans';
import { databaseNow, inTransaction, reading, select, selectOne } from '@/db/work';
import { basket, type BasketAnswer } from '@/services/contracts/baskets';
import { planContent } from '@/services/contracts/plan-content';
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

interface Shop {
  inspector: Person;
  other: Person;
  auditor: Person;
  plan: Setting;
  partNumber: string;
  lamp: string;
}

/** Who and what the basket tests share; filled by `prepareShop`. */
export const shop = {} as Shop;

/** The same drawing under a further plan issue whose penetrant operation asks for no photograph of each part. */
export async function planForBaskets(base: Setting, by: Person, more: Record<string, unknown> = {}): Promise<Setting> {
  const old = await planById(reading(), base.planId);
  const revision = await selectOne<{ id: string }>(reading(), 'SELECT drawing_revision_id AS id FROM plan_issues WHERE id = ?', [
    base.planId,
  ]);
  if (!old || !revision) throw new Error('the plan of the setting is missing');
  const { views, criteria, route } = old;
  const content = planContent.parse({
    views,
    criteria,
    route: route.map((row) => (row.key === 'fpi' ? { ...row, evidence: [], ...more } : row)),
  });
  const planId = newId();
  const rows = content.route.map((row, position) => ({
    id: newId(),
    planIssueId: planId,
    position,
    key: row.key ?? '',
    operation: row.operation,
    title: row.title,
    method: row.method,
    technique: row.technique ?? null,
    content: row,
  }));
  await inTransaction(null, async (work) => {
    await insert(work, planIssues, {
      id: planId,
      drawingRevisionId: revision.id,
      issue: 2,
      state: 'approved',
      content,
      contentDigest: '1'.repeat(64),
      preparedBy: by.id,
      preparedAt: work.now,
      approvedBy: by.id,
      approvedAt: work.now,
      version: 1,
    });
    await insertAll(work, requirements, rows);
  });
  return { ...base, planId, wall: rows[0]?.id ?? '', penetrant: rows[1]?.id ?? '' };
}

export async function partNumberOf(plan: Setting): Promise<string> {
  const row = await selectOne<{ number: string }>(reading(), 'SELECT number FROM drawings WHERE id = ?', [plan.drawingId]);
  return row?.number ?? '';
}

/** Two level-2 inspectors, a lamp in calibration, and a plan whose penetrant operation a basket can do. */
export async function prepareShop(): Promise<void> {
  shop.inspector = await person('inspector');
  shop.other = await person('inspector');
  shop.auditor = await person('auditor');
  shop.plan = await planForBaskets(await setting(shop.inspector), shop.inspector);
  shop.partNumber = await partNumberOf(shop.plan);
  shop.lamp = await gauge('penetrant', 'uv-a-lamp');
  await qualify(shop.inspector, 'penetrant');
  await qualify(shop.other, 'penetrant');
}

export interface ScannedPart {
  readonly id: string;
  readonly serial: string;
}

export async function freshParts(count: number, plan: Setting = shop.plan): Promise<ScannedPart[]> {
  const ids: string[] = [];
  for (let place = 0; place < count; place += 1) ids.push(await partOf(plan, shop.inspector));
  const rows = await select<ScannedPart>(reading(), 'SELECT id, serial FROM parts WHERE id IN (?)', [ids]);
  return ids.map((id) => rows.find((row) => row.id === id) ?? { id, serial: '' });
}

/** What a penetrant basket is opened with. */
export async function setUp(countIn: number, more: Record<string, unknown> = {}): Promise<Record<string, unknown>> {
  return {
    partNumber: shop.partNumber,
    requirement: 'fpi',
    line: 'line 1',
    countIn,
    process: [{ number: 'P3', value: '25', unit: 'min' }],
    acts: [
      { kind: 'processed', person: shop.other.id, at: await databaseNow(), values: { line: 'line 1' } },
      { kind: 'evaluated', equipment: [shop.lamp] },
    ],
    ...more,
  };
}

export async function openedBasket(countIn: number, more: Record<string, unknown> = {}): Promise<BasketAnswer> {
  const answer = await call(openRoute, { method: 'POST', as: shop.inspector, body: await setUp(countIn, more) });
  expect([answer.status, answer.detail]).toEqual([201, '']);
  return basket.parse(answer.json);
}

export function scanInto(
  id: string,
  scan: string,
  more: { as?: Person; headers?: Record<string, string> } = {},
): Promise<Answer> {
  return call(scanRoute, {
    method: 'POST',
    as: more.as ?? shop.inspector,
    params: { id },
    body: { scan },
    ...(more.headers ? { headers: more.headers } : {}),
  });
}

export function signWith(id: string, count: number, more: { as?: Person; body?: object } = {}): Promise<Answer> {
  return call(signRoute, {
    method: 'POST',
    as: more.as ?? shop.inspector,
    params: { id },
    body: { count, password: signingPassword, ...more.body },
  });
}

/** Why a scan was refused. */
export function whyOf(answer: Answer): string {
  return (answer.json as { why?: string }).why ?? '';
}

export async function reread(id: string, as: Person = shop.inspector): Promise<BasketAnswer> {
  return basket.parse((await call(read, { as, params: { id } })).json);
}

export async function filled(count: number): Promise<{ id: string; parts: { id: string; serial: string }[] }> {
  const [{ id }, parts] = [await openedBasket(count), await freshParts(count)];
  for (const { serial } of parts) expect((await scanInto(id, serial)).status).toBe(201);
  return { id, parts };
}

const crack = {
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
};

export async function marked(id: string, partId: string): Promise<string> {
  const row = (await reread(id)).parts.find(({ part }) => part === partId);
  const saved = await call(saveDraft, {
    method: 'PATCH',
    as: shop.inspector,
    params: { id: row?.inspection ?? '' },
    headers: { 'if-match': '"1"' },
    body: { indications: [crack] },
  });
  expect(saved.status).toBe(200);
  return row?.inspection ?? '';
}

export function states(partId: string) {
  return select<{ state: string }>(reading(), 'SELECT state FROM part_requirements WHERE part_id = ? ORDER BY position', [
    partId,
  ]);
}
