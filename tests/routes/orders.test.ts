import { beforeAll, describe, expect, it } from 'vitest';
import { GET as customers, POST as createCustomer } from '@/app/api/customers/route';
import { GET as orders, POST as createOrder } from '@/app/api/orders/route';
import { createCustomer as customerContract, createOrder as orderContract, listOrders } from '@/services/contracts/orders';
import { call, person, setting, type Person, type Setting } from './inspection-setting';
import { drawingOfPlan } from './trace-setting';

let administrator: Person;
let auditor: Person;
let plan: Setting;
let drawing: string;

beforeAll(async () => {
  administrator = await person('administrator');
  auditor = await person('auditor');
  plan = await setting(administrator);
  drawing = await drawingOfPlan(plan.planId);
});

let running = 0;
const fresh = (prefix: string) => `${prefix}${plan.drawingId.slice(-8).toUpperCase()}${String((running += 1))}`;
const post = (body: object, as: Person = administrator) => call(createOrder, { method: 'POST', as, body });
const line = (changes: object = {}) => ({ drawing, revision: 'C', quantity: 12, ...changes });

describe('orders', () => {
  it('keeps lines in order with their dates and clauses, numbered by ten', async () => {
    const statements = [{ code: 'Q-12', text: 'No weld repair was made.' }];
    const answer = await post({
      customer: plan.customerId,
      purchaseOrder: fresh('PO'),
      lines: [line({ dueOn: '2027-03-09', clauses: { retentionYears: 40, statements } }), line({ quantity: 3 })],
    });
    expect(answer.status).toBe(201);
    const made = orderContract.response.parse(answer.json);
    expect(made.number).toMatch(/^O-\d{4}-\d{5}$/);
    expect(made.lines.map((one) => [one.line, one.quantity, one.released, one.dueOn, one.clauses])).toEqual([
      [10, 12, 0, '2027-03-09', { images: false, values: false, statements, retentionYears: 40 }],
      [20, 3, 0, null, { images: false, values: false, statements: [] }],
    ]);
  });

  it('refuses a clause that nobody would carry out, naming it', async () => {
    const answer = await post({
      customer: plan.customerId,
      purchaseOrder: fresh('PO'),
      lines: [line({ clauses: { imagse: true } }), line({ clauses: { statements: [{ code: 'Q-1', text: '' }] } })],
    });
    expect([answer.status, answer.errors.map(({ path }) => path)]).toEqual([
      422,
      ['lines.0.clauses.imagse', 'lines.1.clauses.statements.0.text'],
    ]);
  });

  it('names each line whose drawing revision is not the customer’s, and an unknown customer', async () => {
    const foreign = await setting(administrator);
    const answer = await post({
      customer: plan.customerId,
      purchaseOrder: fresh('PO'),
      lines: [line(), line({ revision: 'Z' }), line({ drawing: await drawingOfPlan(foreign.planId) })],
    });
    expect([answer.status, answer.errors.map(({ path }) => path)]).toEqual([422, ['lines.1.drawing', 'lines.2.drawing']]);
    const nobody = await post({ customer: 'NOBODY', purchaseOrder: fresh('PO'), lines: [line()] });
    expect([nobody.status, nobody.errors[0]?.path]).toEqual([422, 'customer']);
  });

  it('refuses the same purchase order twice, naming ours', async () => {
    const purchaseOrder = fresh('PO');
    const first = orderContract.response.parse((await post({ customer: plan.customerId, purchaseOrder, lines: [line()] })).json);
    const second = await post({ customer: plan.customerId, purchaseOrder, lines: [line()] });
    expect([second.status, second.errors[0]?.path]).toEqual([409, 'purchaseOrder']);
    expect(second.detail).toContain(first.number);
  });

  it.each([
    [{ lines: [] }, 'lines'],
    [{ lines: [{ drawing: 'D', revision: 'A', quantity: 0 }] }, 'lines.0.quantity'],
    [{ lines: [{ drawing: 'D', revision: 'A', quantity: 1, dueOn: '9.3.2027' }] }, 'lines.0.dueOn'],
  ])('names the field of %j', async (changes, path) => {
    const answer = await post({ customer: plan.customerId, purchaseOrder: fresh('PO'), ...changes });
    expect([answer.status, answer.errors[0]?.path]).toEqual([422, path]);
  });

  it('pages newest first, each order with all of its lines', async () => {
    const other = await setting(administrator);
    const otherDrawing = await drawingOfPlan(other.planId);
    const made: string[] = [];
    for (let count = 0; count < 5; count += 1) {
      const body = {
        customer: other.customerId,
        purchaseOrder: fresh('PO'),
        lines: [line(), line()].map((one) => ({ ...one, drawing: otherDrawing })),
      };
      made.unshift(orderContract.response.parse((await post(body)).json).number);
    }
    const code = `K${other.technique.slice(3)}`;
    const seen: string[] = [];
    let after = '';
    do {
      const { json } = await call(orders, { as: auditor, query: `?customer=${code}&limit=2${after}` });
      const page = listOrders.response.parse(json);
      expect(page.items.every(({ lines }) => lines.length === 2)).toBe(true);
      seen.push(...page.items.map(({ number }) => number));
      after = page.next === null ? '' : `&after=${page.next}`;
    } while (after !== '');
    expect(seen).toEqual(made);
  });

  it('are read by staff and auditors, entered by reviewers and administrators, seen by no stranger', async () => {
    expect((await call(orders, {})).status).toBe(401);
    expect((await call(createOrder, { method: 'POST', body: {} })).status).toBe(401);
    expect((await call(orders, { as: await person('customer-quality', plan.customerId) })).status).toBe(403);
    for (const role of ['inspector', 'auditor', 'customer-quality'] as const) {
      const answer = await post({ customer: plan.customerId, purchaseOrder: fresh('PO'), lines: [line()] }, await person(role));
      expect([role, answer.status]).toEqual([role, 403]);
    }
  });
});

describe('customers', () => {
  const body = () => ({
    code: fresh('C'),
    name: 'Harrow Gas Turbines',
    address: '4 Mill Lane',
    qualityEmail: 'quality@harrow.example',
  });
  const enter = (changes: object = {}, as: Person = administrator) =>
    call(createCustomer, { method: 'POST', as, body: { ...body(), ...changes } });

  it('are entered with what a certificate needs, and listed', async () => {
    const answer = await enter({ locale: 'fr' });
    expect(answer.status).toBe(201);
    const made = customerContract.response.parse(answer.json);
    expect([made.locale, made.qualityEmail, made.drawings, made.orders]).toEqual(['fr', 'quality@harrow.example', 0, 0]);
    let after = '';
    const seen: string[] = [];
    do {
      const page = (await call(customers, { as: auditor, query: `?limit=200${after}` })).json as {
        items: { id: string }[];
        next: string | null;
      };
      seen.push(...page.items.map(({ id }) => id));
      after = page.next === null ? '' : `&after=${page.next}`;
    } while (after !== '');
    expect(seen.filter((id) => id === made.id)).toHaveLength(1);
    expect(new Set(seen).size).toBe(seen.length);
  });

  it('refuses a code that is given, and names the field that is wrong', async () => {
    const { code } = customerContract.response.parse((await enter()).json);
    const again = await enter({ code });
    expect([again.status, again.errors[0]?.path]).toEqual([409, 'code']);
    const wrong = await enter({ qualityEmail: 'nowhere', code: 'lower case' });
    expect([wrong.status, wrong.errors.map(({ path }) => path).sort()]).toEqual([422, ['code', 'qualityEmail']]);
  });

  it('are not for strangers and customers, and entered by reviewers and administrators alone', async () => {
    expect((await call(customers, {})).status).toBe(401);
    expect((await call(createCustomer, { method: 'POST', body: body() })).status).toBe(401);
    expect((await call(customers, { as: await person('customer-quality', plan.customerId) })).status).toBe(403);
    for (const role of ['inspector', 'auditor'] as const) expect((await enter({}, await person(role))).status).toBe(403);
    expect((await enter({}, await person('reviewer'))).status).toBe(201);
  });
});
