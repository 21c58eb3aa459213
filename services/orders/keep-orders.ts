import { newId, nextNumber } from '@/db/identity';
import { customerByKey } from '@/db/repositories/drawings';
import { listOrders as rowsOf, orderById } from '@/db/repositories/orders';
import { execute, selectOne, sqlTimeOf, type Reading, type Work } from '@/db/work';
import type { AnswerOf, BodyOf, QueryOf } from '@/services/contracts/operation';
import type { createOrder as contract, listOrders as listContract, Order } from '@/services/contracts/orders';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { Problem, type FieldError } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';

/** Orders, newest first. */
export async function listOrders(reading: Reading, query: QueryOf<typeof listContract>): Promise<AnswerOf<typeof listContract>> {
  const before = partsOfKey(query.after, 2);
  const rows = await rowsOf(reading, query.customer, query.limit + 1, before && [String(before[0]), String(before[1])]);
  return pageOf(
    rows,
    query.limit,
    ({ createdAt, id }) => [createdAt, id],
    (row) => row,
  );
}

async function refuseKnown(work: Work, customerId: string, purchaseOrder: string): Promise<void> {
  const known = await selectOne<{ number: string }>(
    work,
    'SELECT number FROM orders WHERE customer_id = ? AND purchase_order = ?',
    [customerId, purchaseOrder],
  );
  if (known)
    throw new Problem('already-exists', `This purchase order is already entered as ${known.number}.`, [
      { path: 'purchaseOrder', message: `is already entered as ${known.number}` },
    ]);
}

/** Enters a purchase order; lines are numbered 10, 20, … */
export async function createOrder(work: Work, body: BodyOf<typeof contract>): Promise<Recorded<Order>> {
  const customer = await customerByKey(work, body.customer);
  const errors: FieldError[] = customer ? [] : [{ path: 'customer', message: 'is not a known customer' }];
  const revisions: (string | null)[] = [];
  for (const [at, line] of body.lines.entries()) {
    const row = await selectOne<{ id: string; customerId: string }>(
      work,
      'SELECT r.id, d.customer_id AS customerId FROM drawing_revisions r JOIN drawings d ON d.id = r.drawing_id WHERE d.number = ? AND r.revision = ?',
      [line.drawing, line.revision],
    );
    if (!row || row.customerId !== customer?.id)
      errors.push({ path: `lines.${String(at)}.drawing`, message: 'is not a drawing revision of this customer' });
    revisions.push(row?.id ?? null);
  }
  if (errors.length > 0 || !customer)
    throw new Problem('invalid-input', errors.map(({ path, message }) => `${path}: ${message}`).join('; '), errors);
  await refuseKnown(work, customer.id, body.purchaseOrder);
  const id = newId();
  const number = await nextNumber(work, 'O');
  await execute(work, 'INSERT INTO orders (id, number, customer_id, purchase_order, created_at) VALUES (?, ?, ?, ?, ?)', [
    id,
    number,
    customer.id,
    body.purchaseOrder,
    sqlTimeOf(work.now),
  ]);
  for (const [at, line] of body.lines.entries()) {
    await execute(
      work,
      'INSERT INTO order_lines (id, order_id, line, drawing_revision_id, quantity, due_on, clauses) VALUES (?, ?, ?, ?, ?, ?, ?)',
      [newId(), id, (at + 1) * 10, revisions[at], line.quantity, line.dueOn ?? null, JSON.stringify(line.clauses)],
    );
  }
  const answer = await orderById(work, id);
  if (!answer) throw new Error('the order just written is not there');
  return {
    answer,
    events: [
      { subject: { kind: 'order', id }, details: { number, purchaseOrder: body.purchaseOrder, lines: body.lines.length } },
    ],
  };
}
