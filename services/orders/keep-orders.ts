import { newId, nextNumber } from '@/db/identity';
import { customerByKey } from '@/db/repositories/drawings';
import { ordersWithLines } from '@/db/repositories/orders';
import { execute, selectOne, sqlTimeOf, type Reading, type Work } from '@/db/work';
import type { BodyOf } from '@/services/contracts/operation';
import type { createOrder as contract, Order } from '@/services/contracts/orders';
import { Problem, type FieldError } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';

/** Orders, newest first. */
export async function listOrders(reading: Reading): Promise<{ items: Order[]; next: null }> {
  return { items: await ordersWithLines(reading), next: null };
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
  const [answer] = await ordersWithLines(work, id);
  if (!answer) throw new Error('the order just written is not there');
  return {
    answer,
    events: [
      { subject: { kind: 'order', id }, details: { number, purchaseOrder: body.purchaseOrder, lines: body.lines.length } },
    ],
  };
}
