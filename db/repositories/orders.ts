import { orderClauses } from '../../services/contracts/order-clauses';
import type { Order } from '../../services/contracts/orders';
import { isoOf, select, sqlTimeOf, type Reading } from '../work';

type Line = Order['lines'][number];
type Head = Omit<Order, 'lines'>;

async function withLines(reading: Reading, heads: readonly Head[]): Promise<Order[]> {
  if (heads.length === 0) return [];
  const rows = await select<Omit<Line, 'clauses'> & { orderId: string; clauses: string }>(
    reading,
    `SELECT l.order_id AS orderId, l.id, l.line, d.number AS partNumber, r.revision, l.quantity, l.released, DATE_FORMAT(l.due_on, '%Y-%m-%d') AS dueOn, l.clauses
     FROM order_lines l JOIN drawing_revisions r ON r.id = l.drawing_revision_id JOIN drawings d ON d.id = r.drawing_id WHERE l.order_id IN (?) ORDER BY l.order_id, l.line`,
    [heads.map(({ id }) => id)],
  );
  const lines = new Map<string, Line[]>(heads.map(({ id }) => [id, []]));
  for (const { orderId, clauses, ...rest } of rows)
    lines.get(orderId)?.push({ ...rest, clauses: orderClauses.parse(JSON.parse(clauses)) });
  return heads.map((head) => ({ ...head, lines: lines.get(head.id) ?? [] }));
}

const query = `SELECT o.id, o.number, o.purchase_order AS purchaseOrder, c.name AS customer, ${isoOf('o.created_at')} AS createdAt
  FROM orders o JOIN customers c ON c.id = o.customer_id`;

/** Orders with their lines, newest first before a key; those of one customer (by code) when one is named. */
export async function listOrders(
  reading: Reading,
  customer: string | undefined,
  limit: number,
  before: readonly [string, string] | null,
): Promise<Order[]> {
  const where = ['1 = 1'];
  const values: unknown[] = [];
  if (customer) {
    where.push('c.code = ?');
    values.push(customer);
  }
  if (before) {
    where.push('o.created_at <= ? AND (o.created_at < ? OR o.id < ?)');
    values.push(sqlTimeOf(before[0]), sqlTimeOf(before[0]), before[1]);
  }
  const heads = await select<Head>(
    reading,
    `${query} WHERE ${where.join(' AND ')} ORDER BY o.created_at DESC, o.id DESC LIMIT ?`,
    [...values, limit],
  );
  return withLines(reading, heads);
}

export async function orderById(reading: Reading, orderId: string): Promise<Order | undefined> {
  return (await withLines(reading, await select<Head>(reading, `${query} WHERE o.id = ?`, [orderId])))[0];
}
