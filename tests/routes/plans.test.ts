import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { GET as drawings, POST as createDrawing } from '@/app/api/drawings/route';
import { GET as plansOf, POST as draft } from '@/app/api/drawings/[number]/plans/route';
import { POST as approve } from '@/app/api/plans/[id]/approval/route';
import { POST as check } from '@/app/api/plans/[id]/check/route';
import { GET as faultsOf } from '@/app/api/plans/[id]/faults/route';
import { GET as read, PUT as change } from '@/app/api/plans/[id]/route';
import { POST as withdraw } from '@/app/api/plans/[id]/withdrawal/route';
import { closeDatabase } from '@/db/connection';
import { execute, inTransaction, reading, select } from '@/db/work';
import type { Plan } from '@/services/contracts/plan-content';
import { call, person, setting, signingPassword, type Person } from './inspection-setting';

let preparer: Person;
let checker: Person;
let approver: Person;
let customer: string;

beforeAll(async () => {
  preparer = await person('administrator');
  checker = await person('reviewer');
  approver = await person('reviewer');
  customer = (await setting(preparer)).customerId;
});
afterAll(closeDatabase);

let running = 0;
const fresh = () => `PL-${customer.slice(-8).toUpperCase()}-${String((running += 1))}`;

const guarded = { rule: 'guarded', form: 'non-binary', g: '1' };
const content = {
  views: [{ name: 'concave', title: 'Concave side', widthUm: 40_000, heightUm: 25_000 }],
  criteria: {
    lengthUnit: 'mm',
    linear: { ratio: '3', at: 'above' },
    characteristics: [
      { number: '12', title: 'Wall', unit: 'mm', lower: '0.75', upper: '1.05', uncertaintyMax: '0.03', decision: guarded },
    ],
    zones: [
      {
        id: 'B',
        view: 'concave',
        polygon: [
          [0, 0],
          [40_000, 0],
          [40_000, 25_000],
        ],
      },
    ],
    indicationRules: [
      {
        id: 'N7',
        zones: ['B'],
        methods: ['penetrant'],
        types: ['*'],
        rules: [{ kind: 'max-size', class: 'rounded', limit: '0.75' }],
      },
    ],
  },
  route: [
    { operation: '110', title: 'Walls', method: 'ultrasonic-thickness', characteristics: ['12'] },
    { operation: '210', title: 'Penetrant', method: 'penetrant', views: ['concave'], indicationRules: ['N7'] },
  ],
};

async function drawn(): Promise<string> {
  const number = fresh();
  const body = { number, title: 'Vane', revision: 'C', customer };
  expect((await call(createDrawing, { method: 'POST', as: preparer, body })).status).toBe(201);
  return number;
}

async function drafted(number: string, changes: object = {}): Promise<Plan> {
  const answer = await call(draft, { method: 'POST', as: preparer, params: { number }, body: { ...content, ...changes } });
  expect(answer.status).toBe(201);
  return answer.json as Plan;
}

const move = (handler: typeof check, plan: Plan, as: Person, body: object = {}) =>
  call(handler, { method: 'POST', as, params: { id: plan.id }, body });
const sign = { password: signingPassword };

async function approved(number: string): Promise<Plan> {
  const plan = await drafted(number);
  expect((await move(check, plan, checker)).status).toBe(200);
  const answer = await move(approve, plan, approver, sign);
  expect(answer.status).toBe(200);
  return answer.json as Plan;
}

const put = (plan: Plan, body: object, ifMatch?: number) =>
  call(change, {
    method: 'PUT',
    as: preparer,
    params: { id: plan.id },
    body,
    ...(ifMatch === undefined ? {} : { headers: { 'if-match': `"${String(ifMatch)}"` } }),
  });

describe('a plan issue', () => {
  it('goes from draft over a second person to approval, and its route becomes requirements', async () => {
    const plan = await approved(await drawn());
    expect([plan.state, plan.issue, plan.checked?.id, plan.approved?.id]).toEqual(['approved', 1, checker.id, approver.id]);
    const rows = await select<{ operation: string }>(
      reading(),
      'SELECT operation FROM requirements WHERE plan_issue_id = ? ORDER BY position',
      [plan.id],
    );
    expect(rows.map(({ operation }) => operation)).toEqual(['110', '210']);
  });

  it('never changes once approved: not by the call, and not by the database', async () => {
    const plan = await approved(await drawn());
    const answer = await put(plan, content, plan.version);
    expect([answer.status, answer.json]).toMatchObject([409, { type: '/problems/state-refused' }]);
    await expect(
      inTransaction(null, (work) => execute(work, "UPDATE plan_issues SET content = '{}' WHERE id = ?", [plan.id])),
    ).rejects.toThrow(/never changes|denied/);
  });

  it('is neither checked nor approved by who prepared it', async () => {
    const reviewer = await person('reviewer');
    const number = await drawn();
    const own = (await call(draft, { method: 'POST', as: reviewer, params: { number }, body: content })).json as Plan;
    expect((await move(check, own, reviewer)).status).toBe(403);
    expect((await move(check, own, checker)).status).toBe(200);
    expect((await move(approve, own, reviewer, sign)).status).toBe(403);
    expect((await move(approve, own, approver, sign)).status).toBe(200);
  });

  it('is refused with every fault at once: no zone left, unknown kind, unknown view, a reference that leads nowhere', async () => {
    const criteria = {
      ...content.criteria,
      characteristics: [{ ...content.criteria.characteristics[0], lower: '0.75', upper: '0.80' }],
      indicationRules: [{ ...content.criteria.indicationRules[0], rules: [{ kind: 'most-beautiful' }] }],
      zones: [{ ...content.criteria.zones[0], view: 'convex' }],
    };
    const route = [...content.route, { operation: '300', title: 'Weigh', method: 'mass', characteristics: ['M1'] }];
    const plan = await drafted(await drawn(), { criteria, route });
    const wanted = [
      'criteria.characteristics.0.uncertaintyMax',
      'criteria.indicationRules.0.rules.0.kind',
      'criteria.zones.0.view',
      'route.2.characteristics.0',
    ];
    const answer = await move(check, plan, checker);
    expect(answer.status).toBe(422);
    expect(answer.errors.map(({ path }) => path)).toEqual(expect.arrayContaining(wanted));
    const listed = (await call(faultsOf, { as: checker, params: { id: plan.id } })).json as { faults: { path: string }[] };
    expect(listed.faults.map(({ path }) => path)).toEqual(answer.errors.map(({ path }) => path));
  });

  it('that has no operation would make its parts releasable at once, and is refused', async () => {
    const plan = await drafted(await drawn(), { criteria: {}, route: [] });
    expect((await move(check, plan, checker)).errors.map(({ path }) => path)).toContain('route');
  });

  it('is saved against the version that was read: 428 without it, 412 with what stands when it is old', async () => {
    const plan = await drafted(await drawn());
    expect((await put(plan, content)).status).toBe(428);
    const first = await put(plan, { ...content, rework: [{ kind: 'blend', title: 'Blend' }] }, plan.version);
    expect([first.status, (first.json as Plan).rework.length]).toEqual([200, 1]);
    const late = await put(plan, content, plan.version);
    expect([late.status, (late.json as { present: Plan }).present.rework.length]).toEqual([412, 1]);
  });

  it('is approved once when two approve at the same moment', async () => {
    const plan = await drafted(await drawn());
    await move(check, plan, checker);
    const answers = await Promise.all([move(approve, plan, approver, sign), move(approve, plan, checker, sign)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
  });

  it('supersedes the approved issue before it, and drafts made at once get numbers of their own', async () => {
    const number = await drawn();
    const first = await approved(number);
    const [a, b] = await Promise.all([drafted(number), drafted(number)]);
    expect([a.issue, b.issue].sort()).toEqual([2, 3]);
    await move(check, a, checker);
    await move(approve, a, approver, sign);
    const { json } = await call(plansOf, { as: checker, params: { number } });
    expect((json as { items: Plan[] }).items.map(({ issue, state }) => [issue, state]).sort()).toEqual([
      [1, 'superseded'],
      [2, a.issue === 2 ? 'approved' : 'draft'],
      [3, a.issue === 3 ? 'approved' : 'draft'],
    ]);
    expect(first.issue).toBe(1);
  });

  it('is neither checked nor approved by anybody who rewrote it', async () => {
    const plan = await drafted(await drawn());
    const body = { ...content, rework: [{ kind: 'blend', title: 'Blend' }] };
    const headers = { 'if-match': `"${String(plan.version)}"` };
    const rewritten = await call(change, { method: 'PUT', as: checker, params: { id: plan.id }, body, headers });
    expect(rewritten.status).toBe(200);
    expect((await move(check, plan, checker)).status).toBe(403);
    expect((await move(check, plan, approver)).status).toBe(200);
    expect((await move(approve, plan, checker, sign)).status).toBe(403);
  });

  it(
    'is the only approved one of its revision, also when two issues are approved at the same moment',
    { timeout: 60_000 },
    async () => {
      const number = await drawn();
      for (let round = 0; round < 10; round += 1) {
        const [a, b] = [await drafted(number), await drafted(number)];
        await Promise.all([move(check, a, checker), move(check, b, checker)]);
        await Promise.all([move(approve, a, approver, sign), move(approve, b, checker, sign)]);
        const { json } = await call(plansOf, { as: checker, params: { number } });
        const standing = (json as { items: Plan[] }).items.filter(({ state }) => state === 'approved');
        expect(standing.map(({ issue }) => issue)).toEqual([b.issue]);
      }
    },
  );

  it('comes too late when a newer issue is approved', async () => {
    const number = await drawn();
    const [older, newer] = [await drafted(number), await drafted(number)];
    for (const plan of [older, newer]) await move(check, plan, checker);
    expect((await move(approve, newer, approver, sign)).status).toBe(200);
    expect((await move(approve, older, approver, sign)).problem).toBe('state-refused');
  });

  it('is withdrawn for error with a reason, and stays readable', async () => {
    const plan = await approved(await drawn());
    expect((await move(withdraw, plan, approver, { ...sign, reason: 'no' })).errors.map(({ path }) => path)).toEqual(['reason']);
    const answer = await move(withdraw, plan, approver, { ...sign, reason: 'the limit of note 7 was misread' });
    expect([answer.status, (answer.json as Plan).state]).toEqual([200, 'withdrawn-for-error']);
    expect(((await call(read, { as: checker, params: { id: plan.id } })).json as Plan).endedReason).toMatch(/misread/);
  });

  it('is approved by the person and not by a session left open', async () => {
    const plan = await drafted(await drawn());
    await move(check, plan, checker);
    const answer = await move(approve, plan, approver, { password: 'not it' });
    expect([answer.status, answer.errors.map(({ path }) => path)]).toEqual([403, ['password']]);
  });
});

describe('drawings', () => {
  it('take a further revision of the same customer, and refuse one of another or one that is known', async () => {
    const number = await drawn();
    const other = (await setting(preparer)).customerId;
    const post = (body: object) =>
      call(createDrawing, { method: 'POST', as: preparer, body: { number, title: 'Vane', ...body } });
    expect((await post({ revision: 'D', customer })).status).toBe(201);
    const known = await post({ revision: 'D', customer });
    expect([known.status, known.errors[0]?.path]).toEqual([409, 'revision']);
    const foreign = await post({ revision: 'E', customer: other });
    expect([foreign.status, foreign.errors[0]?.path]).toEqual([409, 'number']);
    const nobody = await post({ revision: 'E', customer: 'NOBODY' });
    expect([nobody.status, nobody.errors[0]?.path]).toEqual([422, 'customer']);
  });

  it('are paged by number', async () => {
    await drawn();
    const page = (await call(drawings, { as: checker, query: '?limit=1' })).json as { items: object[]; next: string | null };
    expect([page.items.length, typeof page.next]).toEqual([1, 'string']);
  });
});

describe('plans are refused', () => {
  it.each(['inspector', 'auditor', 'customer-quality'] as const)('to be prepared by the role %s', async (role) => {
    const as = await person(role);
    const number = await drawn();
    const plan = await drafted(number);
    expect((await call(draft, { method: 'POST', as, params: { number }, body: content })).status).toBe(403);
    expect((await move(check, plan, as)).status).toBe(403);
    expect((await move(approve, plan, as, sign)).status).toBe(403);
  });

  it('to strangers and customers, and do not exist where they do not', async () => {
    const plan = await drafted(await drawn());
    const outsider = await person('customer-quality', customer);
    expect((await call(read, { params: { id: plan.id } })).status).toBe(401);
    expect((await call(read, { as: outsider, params: { id: plan.id } })).status).toBe(403);
    expect((await call(read, { as: checker, params: { id: '01900000-0000-7000-8000-000000000001' } })).status).toBe(404);
    expect((await call(plansOf, { as: checker, params: { number: 'NOT-DRAWN' } })).status).toBe(404);
  });
});
